import type { Knex } from 'knex';
import { HOUSE_FOLD_VERSION } from '#shared/domain/house/fold.ts';
import type { Fact } from '#shared/domain/journal/fact.ts';
import type { Topic } from '#shared/realtime/events.ts';
import { isDatabaseAway, isLostRace } from '../db/errors.ts';
import type { CentreRef } from '../http/route.ts';
import { applied, begun, type Day, type Days, houseOf, lastOf, trimmed } from './days.ts';
import { lockHead, saveCheckpoints, saveHead, saveOutbox } from './head-store.ts';
import { decided, entered } from './journal-rows.ts';
import { append, eventKey, known } from './journal-store.ts';
import type { Decision, DeviceEntry, EntryResult, HouseAt } from './ledger.ts';
import { earlierDays, upToDate } from './memory.ts';
import type { Memory } from './remembered.ts';
import { changesBetween, writeChanges } from './projection/changes.ts';
import { mend } from './set-aside-store.ts';
import type { JournalRow } from './tables.ts';
import { touchedBy } from './touched.ts';
import type { Work, WorkOf } from './work.ts';

/** What a unit of work came to: the memory to publish, and answers to give after the commit. */
export interface Outcome {
  memory: Memory;
  answers: (() => void)[];
}

/**
 * One unit of work of a centre: everything that waited, under the lock of its head. Events first, together; then each decision upon
 * the house as those before it left it. Nothing outside the transaction changes, so it may be repeated whole.
 */
export async function performUnit(trx: Knex.Transaction, centre: CentreRef, memory: Memory | null, works: readonly Work[]): Promise<Outcome> {
  const head = await lockHead(trx, centre);
  const unit = new Unit(trx, centre, await upToDate(trx, centre, memory, head), Math.max(...works.map((work) => work.now)));
  await unit.enter(works.filter((work) => work.kind === 'device'));
  for (const work of works) {
    if (work.kind === 'mended') await unit.mend(work);
    if (work.kind === 'decision') await unit.decide(work);
    if (work.kind === 'look') unit.answers.push(work.answer);
  }
  return unit.save();
}

class Unit {
  readonly answers: (() => void)[] = [];
  private readonly seq: number;
  private before: Days;
  private days: Days;
  private lateAt: number;
  private readonly rows: JournalRow[] = [];
  private readonly topics = new Set<Topic>();
  private n = 0;
  private written = false;

  constructor(private readonly trx: Knex.Transaction, private readonly centre: CentreRef, private readonly start: Memory, private readonly now: number) {
    this.seq = start.seq + 1;
    this.before = start.days;
    this.days = start.days;
    this.lateAt = start.lateAt;
  }

  private house(): HouseAt {
    return { state: houseOf(this.days), seq: this.written ? this.seq : this.start.seq, epoch: this.start.epoch };
  }

  private place(): { seq: number; n: number } {
    return { seq: this.seq, n: this.n++ };
  }

  /** Puts facts into their days; reaches back for days that are out of memory. */
  private async put(facts: readonly Fact[]): Promise<void> {
    if (facts.length === 0) return;
    const times = facts.map((fact) => fact.time);
    const oldest = Math.min(...times);
    const earlier: Day[] = await earlierDays(this.trx, this.centre, this.days, oldest);
    this.before = [...earlier, ...this.before] as unknown as Days;
    this.days = begun([...earlier, ...this.days] as unknown as Days, this.centre, Math.max(this.now, ...times));
    if (oldest < lastOf(this.days).from) this.lateAt = this.now;
    this.days = applied(this.days, facts);
  }

  async enter(works: readonly WorkOf<'device'>[]): Promise<void> {
    const entries = works.flatMap((work) => work.entries);
    if (entries.length === 0) return void works.forEach((work) => this.answers.push(() => work.answer([])));
    const seen = await known(this.trx, this.centre.id, entries);
    const facts: Fact[] = [];
    for (const work of works) {
      const results = work.entries.map((entry) => this.enterOne(entry, work.now, seen, facts));
      this.answers.push(() => work.answer(results));
    }
    await this.put(facts);
  }

  private enterOne(entry: DeviceEntry, receivedAt: number, seen: Map<string, Buffer>, facts: Fact[]): EntryResult {
    const key = eventKey(entry.source, entry.id);
    const first = seen.get(key);
    if (first) return { outcome: 'duplicate', changed: !first.equals(entry.hash) };
    seen.set(key, entry.hash);
    const { fact, row } = entered(this.centre.id, entry, receivedAt, this.place());
    this.rows.push(row);
    this.written = true;
    if (fact) facts.push(fact);
    else this.topics.add('settings');
    return fact ? { outcome: 'accepted' } : { outcome: 'set-aside', reason: entry.reason ?? 'unknown' };
  }

  async mend(work: WorkOf<'mended'>): Promise<void> {
    let count = 0;
    for (const event of work.events) {
      const fact = await mend(this.trx, this.centre.id, event, work.now, this.place());
      if (!fact) continue;
      await this.put([fact]);
      this.topics.add('settings');
      this.written = true;
      count += 1;
    }
    this.answers.push(() => work.answer(count));
  }

  /** A refusal ends this decision alone, before it wrote anything; its own writes stand or fall together with its answer. */
  async decide(work: WorkOf<'decision'>): Promise<void> {
    const untouched = this.days;
    try {
      const decision = await work.decide(this.house(), work.now, this.trx);
      const made = decision.facts.map((fact) => decided(this.centre.id, fact, work.now, this.place()));
      await this.put(made.map(({ fact }) => fact));
      const after = { ...this.house(), seq: this.seq };
      const result = await this.writeOwn(decision, after);
      this.rows.push(...made.map(({ row }) => row));
      for (const topic of [...(decision.topics ?? []), ...made.map(({ fact }) => topicOf(fact))]) if (topic) this.topics.add(topic);
      if (made.length > 0 || decision.write || decision.topics?.length) this.written = true;
      this.answers.push(() => work.answer(result));
    } catch (error) {
      if (isLostRace(error) || isDatabaseAway(error)) throw error;
      this.days = untouched;
      this.answers.push(() => work.fail(error));
    }
  }

  private async writeOwn({ write, result }: Decision<unknown>, after: HouseAt): Promise<unknown> {
    const answer = result(after);
    if (write) await this.trx.transaction(async (savepoint) => write(savepoint, this.seq));
    return answer;
  }

  async save(): Promise<Outcome> {
    if (!this.written) return { memory: this.start, answers: this.answers };
    const changes = changesBetween(this.before, this.days);
    await append(this.trx, this.rows);
    await writeChanges(this.trx, this.centre.id, this.seq, changes);
    await saveCheckpoints(this.trx, this.centre.id, this.newCheckpoints(), this.now);
    const touched = touchedBy(houseOf(this.before), houseOf(this.days), changes, this.topics);
    if (touched.lanes.length + touched.topics.length > 0) await saveOutbox(this.trx, this.centre.id, this.seq, touched, this.now);
    await saveHead(this.trx, this.centre, { seq: this.seq, epoch: this.start.epoch, foldVersion: HOUSE_FOLD_VERSION, checkpointAt: lastOf(this.days).from });
    const days = trimmed(this.days, this.now, this.lateAt);
    return { memory: { seq: this.seq, epoch: this.start.epoch, days, lateAt: this.lateAt }, answers: this.answers };
  }

  /** Bases of days that have begun, or that a late fact changed. */
  private newCheckpoints(): { at: number; state: Day['timeline']['base'] }[] {
    return this.days.flatMap((day) => {
      const old = this.before.find((d) => d.from === day.from);
      return day.from === 0 || old?.timeline.base === day.timeline.base ? [] : [{ at: day.from, state: day.timeline.base }];
    });
  }
}

const topicOf = (fact: Fact): Topic | null => (fact.type.startsWith('session.') ? 'sessions' : null);

