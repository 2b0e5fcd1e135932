import type { CallDetail } from '#shared/contracts/calls.ts';
import { Problem } from '../../lib/api.ts';

/** What a person can do to a call; each name is a route of the calls contracts. */
export type ActionKind =
  | 'acknowledge' | 'takeOver' | 'onLane' | 'clear' | 'park' | 'unpark' | 'outOfService' | 'backInService'
  | 'lockoutBegin' | 'lockoutStep' | 'lockoutRelease' | 'lockoutLeftBehind';

export interface QueuedAction {
  /** Idempotency key: a repeat after a lost answer has the effect of once. */
  key: string;
  user: string;
  centre: string;
  call: string;
  kind: ActionKind;
  body: Record<string, string | number | boolean> | null;
  /** Server time at which it was pressed, epoch ms. */
  madeAt: number;
}

export interface RefusedAction {
  action: QueuedAction;
  problem: Problem;
}

export interface QueueState {
  /** Oldest first; sent in this order. */
  waiting: readonly QueuedAction[];
  refused: readonly RefusedAction[];
  /** The server was not reached at the last try: what waits is shown as queued. */
  away: boolean;
}

/** Where the queue meets the world; passed in so that tests hold it. */
export interface QueueWorld {
  send: (action: QueuedAction) => Promise<CallDetail>;
  load: () => readonly QueuedAction[];
  save: (waiting: readonly QueuedAction[]) => void;
  /** Runs something after `ms`; gives what cancels it. */
  after: (ms: number, run: () => void) => () => void;
  onDone: (action: QueuedAction, detail: CallDetail) => void;
}

const RETRY_MS = 4000;

/** Is the action to be kept and sent again? Not reached, busy, signed out, or sent too often; everything else is an answer. */
const keeps = (problem: Problem): boolean => [0, 401, 429, 503].includes(problem.status);

/**
 * Actions of one person on calls, one after another, kept on the phone until the server has answered each. A refusal ends
 * the action and those queued behind it on the same call: they were pressed believing in it.
 */
export class ActionQueue {
  private state: QueueState;
  private sending = false;
  private again: (() => void) | null = null;
  private readonly listeners = new Set<() => void>();
  private readonly world: QueueWorld;
  private user: string | null = null;

  constructor(world: QueueWorld) {
    this.world = world;
    this.state = { waiting: world.load(), refused: [], away: false };
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };
  readonly snapshot = (): QueueState => this.state;

  /** Whose actions are sent: another person's on the same phone wait for that person. */
  startFor(user: string): void {
    this.user = user;
    void this.flush();
  }

  add(action: QueuedAction): void {
    this.change({ waiting: [...this.state.waiting, action] });
    void this.flush();
  }

  dismiss(key: string): void {
    this.change({ refused: this.state.refused.filter((one) => one.action.key !== key) });
  }

  /** Sends what waits, in order, until it is empty or the server is away. */
  async flush(): Promise<void> {
    if (this.sending) return;
    this.sending = true;
    this.again?.();
    this.again = null;
    for (let next = this.next(); next; next = this.next()) {
      if (!(await this.attempt(next))) break;
    }
    this.sending = false;
  }

  private next(): QueuedAction | undefined {
    return this.state.waiting.find((action) => action.user === this.user);
  }

  private async attempt(action: QueuedAction): Promise<boolean> {
    try {
      const detail = await this.world.send(action);
      this.change({ waiting: this.state.waiting.filter((one) => one.key !== action.key), away: false });
      this.world.onDone(action, detail);
      return true;
    } catch (error) {
      const problem = error instanceof Problem ? error : new Problem(500, 'unexpected');
      if (keeps(problem)) return this.wait();
      const dropped = this.state.waiting.filter((one) => one.call === action.call && one.user === action.user);
      this.change({ waiting: this.state.waiting.filter((one) => !dropped.includes(one)), refused: [...this.state.refused, { action, problem }], away: false });
      return true;
    }
  }

  private wait(): false {
    this.change({ away: true });
    this.again = this.world.after(RETRY_MS, () => void this.flush());
    return false;
  }

  private change(part: Partial<QueueState>): void {
    this.state = { ...this.state, ...part };
    if (part.waiting) this.world.save(this.state.waiting);
    for (const listener of this.listeners) listener();
  }
}
