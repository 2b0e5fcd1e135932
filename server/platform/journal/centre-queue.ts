import type { Knex } from 'knex';
import { withoutBeforeCommit } from '../db/before-commit.ts';
import { isDatabaseAway } from '../db/errors.ts';
import { unitOfWork } from '../db/unit-of-work.ts';
import { Refusal } from '../http/refusal.ts';
import type { CentreRef } from '../http/route.ts';
import { readHead } from './head-store.ts';
import type { HouseAt } from './ledger.ts';
import { houseAt } from './memory.ts';
import type { Memory } from './remembered.ts';
import { performUnit } from './unit.ts';
import type { Work } from './work.ts';

/** Events of a unit of work at most: keeps its time well under the deadline, and the places in it within the 14 bits of a raise's id. */
const EVENTS_A_UNIT = 2_000;
/** How old a reader's view may be against what another node has committed. Own commits are seen at once. */
const TRUST_MS = 100;

/** What waits for one centre, the one worker that does it, and what the process remembers of the centre. */
export class CentreQueue {
  private readonly waiting: Work[] = [];
  private memory: Memory | null = null;
  private busy = false;
  private trustedUntil = 0;
  private looking: Promise<void> | null = null;

  constructor(private readonly db: Knex, private centre: CentreRef) {}

  /** The centre as its settings are now: zone and cut may have changed. */
  of(centre: CentreRef): this {
    this.centre = centre;
    return this;
  }

  add(work: Work): void {
    this.waiting.push(work);
    if (!this.busy) withoutBeforeCommit(() => void this.work());
  }

  /** The house as of the last commit of this process, and of any other up to 100 ms ago. */
  async read(now: number): Promise<HouseAt> {
    if (!this.memory || performance.now() >= this.trustedUntil) {
      this.looking ??= this.look(now).finally(() => (this.looking = null));
      await this.looking;
    }
    if (!this.memory) throw new Error('a centre was read before it was loaded');
    return houseAt(this.memory);
  }

  private async look(now: number): Promise<void> {
    const asked = performance.now();
    const head = this.memory && (await readHead(this.db, this.centre));
    const memory = this.memory;
    if (head && memory && memory.epoch === head.epoch && memory.seq >= head.seq) this.trustedUntil = asked + TRUST_MS;
    else await new Promise<void>((answer, fail) => this.add({ kind: 'look', now, answer, fail }));
  }

  private async work(): Promise<void> {
    this.busy = true;
    while (this.waiting.length > 0) await this.perform(this.taken());
    this.busy = false;
  }

  /** All that waits, in the order it came, up to the size of a unit. */
  private taken(): Work[] {
    let events = 0;
    const end = this.waiting.findIndex((work, i) => {
      events += work.kind === 'device' ? work.entries.length : 1;
      return i > 0 && events > EVENTS_A_UNIT;
    });
    return this.waiting.splice(0, end < 0 ? this.waiting.length : end);
  }

  /** Work that fails alone fails alone: what was joined to it is done again without it. */
  private async perform(works: Work[]): Promise<void> {
    try {
      const asked = performance.now();
      const { memory, answers } = await unitOfWork(this.db, (trx) => performUnit(trx, this.centre, this.memory, works), { repeatOnDuplicate: ['journal_event'] });
      this.memory = memory;
      this.trustedUntil = asked + TRUST_MS;
      for (const answer of answers) answer();
    } catch (error) {
      const shared = works.length === 1 || isDatabaseAway(error) || error instanceof Refusal;
      if (shared) for (const work of works) work.fail(error);
      else for (const work of works) await this.perform([work]);
    }
  }
}
