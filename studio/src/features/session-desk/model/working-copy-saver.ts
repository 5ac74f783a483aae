import type { WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { ApiProblem, isProblem, problemSentence, Unreachable } from '../../../lib/api/api-problem.ts';
import type { HeldEdits } from './held-edits.ts';
import type { Base } from './opened-desk.ts';
import { contentOfWorking, contentMark, type Content } from './working-content.ts';

/** How far what is on the desk has come. */
export type SavePhase =
  | { kind: 'kept'; at: number | null }
  | { kind: 'saving' }
  /** Nothing answers; tried again until something does. */
  | { kind: 'offline' }
  | { kind: 'signed-out' }
  | { kind: 'refused'; why: string }
  /** Another change came first; nothing is sent until somebody chooses. */
  | { kind: 'conflict'; theirs: WorkingCopy };

export type SaverState = { phase: SavePhase; /** Whether this browser lets edits be held. */ isHeld: boolean };

/** What the saver speaks to. */
export type SaverPorts = {
  write: (content: Content, version: number) => Promise<WorkingCopy>;
  read: () => Promise<WorkingCopy>;
  /** Holds edits in this browser; false where it refuses. */
  hold: (edits: HeldEdits) => boolean;
  /** Hears of every copy that the server acknowledged. */
  acknowledged?: (copy: WorkingCopy) => void;
  /** Whether a call failed for want of a signed-in person. */
  isSignedOut: (error: unknown) => boolean;
};

/** How soon a change is held in this browser [ms]; short, and off the path from an edit to its curve. */
const HOLD_MS = 50;
/** How long the hand rests before a change is sent [ms], and the longest it waits while the hand does not rest. */
const REST_MS = 600;
const REST_AT_MOST_MS = 5000;
const FIRST_RETRY_MS = 1000;
const LAST_RETRY_MS = 60_000;

type Timer = ReturnType<typeof setTimeout> | undefined;

/**
 * Saves the working copy of one study: into this browser first, then to the server, one call at a time, the newest
 * content each time. It never writes over a version that it has not seen, and takes its own writes, also those whose
 * answer was lost, for its own.
 */
export class WorkingCopySaver {
  private state: SaverState;
  private content: Content;
  private base: Base;
  private attempts: string[];
  private readonly ports: SaverPorts;
  private readonly listeners = new Set<() => void>();
  private holdTimer: Timer;
  private sendTimer: Timer;
  private unsentSince: number | null = null;
  private failures = 0;
  private underWay: Promise<void> | null = null;
  private isPaused = false;

  constructor(
    content: Content,
    base: Base,
    attempts: readonly string[],
    conflict: WorkingCopy | null,
    ports: SaverPorts,
  ) {
    this.content = content;
    this.base = base;
    this.attempts = [...attempts];
    this.ports = ports;
    this.state = {
      phase: conflict ? { kind: 'conflict', theirs: conflict } : { kind: 'kept', at: null },
      isHeld: true,
    };
    if (!conflict && this.isUnsent()) this.changed(content, true);
  }

  readonly get = (): SaverState => this.state;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** Version of the working copy that the desk's content was made from. */
  get version(): number {
    return this.base.version;
  }

  /** Hears what stands on the desk. Cheap where nothing of the content is another. */
  changed(content: Content, force = false): void {
    if (!force && content.draft === this.content.draft && content.references === this.content.references) return;
    this.content = content;
    this.holdTimer ??= setTimeout(() => this.hold(), HOLD_MS);
    this.unsentSince ??= Date.now();
    if (this.state.phase.kind === 'conflict' || this.state.phase.kind === 'signed-out') return;
    if (this.state.phase.kind === 'offline') return;
    this.enter({ kind: 'saving' });
    this.sendSoon();
  }

  /** Holds and sends at once what has not been: the page may be about to go. */
  flush(): void {
    if (this.holdTimer !== undefined) this.hold();
    if (this.state.phase.kind === 'saving') this.send();
  }

  /** Holds what is on the desk; false where the browser refuses. */
  holdNow(): boolean {
    this.hold();
    return this.state.isHeld;
  }

  /** Tries again now, as when the connection or the session is back. */
  readonly retry = (): void => {
    const { kind } = this.state.phase;
    if (kind !== 'offline' && kind !== 'signed-out' && kind !== 'refused') return;
    this.failures = 0;
    this.enter({ kind: 'saving' });
    this.send();
  };

  /**
   * Hears a copy that was read from the server.
   *
   * @returns the copy where it is newer than what is on the desk and nothing here is unsent: take it onto the desk, then
   *          say so by `took`. Otherwise null; where edits here are unsent, sending them finds the conflict.
   */
  heard(copy: WorkingCopy): WorkingCopy | null {
    if (copy.version <= this.base.version || this.underWay || this.isPaused) return null;
    if (this.state.phase.kind !== 'kept' || this.isUnsent()) return null;
    return copy;
  }

  /** Makes further edits from this copy; what is on the desk is compared with it. */
  took(copy: WorkingCopy): void {
    this.base = { version: copy.version, mark: contentMark(contentOfWorking(copy)) };
    this.attempts = [];
    this.settle();
  }

  /**
   * Waits until everything is saved, then runs a call that needs the version, with nothing else sent meanwhile.
   *
   * @param call  gives the copy that holds after it
   * @throws {Error} where something cannot be saved now; the message says why
   */
  async alone<T extends { working: WorkingCopy }>(call: (version: number) => Promise<T>): Promise<T> {
    await this.saved();
    this.isPaused = true;
    try {
      const answer = await call(this.base.version);
      this.base = { version: answer.working.version, mark: contentMark(contentOfWorking(answer.working)) };
      this.hold();
      return answer;
    } finally {
      this.isPaused = false;
      if (this.isUnsent()) this.sendSoon();
    }
  }

  /** Stops all timers; what is held stays. */
  stop(): void {
    this.flush();
    clearTimeout(this.sendTimer);
    clearTimeout(this.holdTimer);
    this.holdTimer = undefined;
  }

  private isUnsent(): boolean {
    return contentMark(this.content) !== this.base.mark;
  }

  /** @throws {Error} where what is on the desk cannot be saved now; the message says why */
  async saved(): Promise<void> {
    if (this.state.phase.kind === 'offline' || this.state.phase.kind === 'refused') this.retry();
    // Edits made while a call is under way are sent by the next.
    while (this.underWay ?? (this.isUnsent() && this.state.phase.kind === 'saving')) {
      if (!this.underWay) this.send();
      await this.underWay;
    }
    const { phase } = this.state;
    if (phase.kind === 'kept') return;
    if (phase.kind === 'saving' && !this.isUnsent()) return;
    throw new Error(whyUnsaved(phase));
  }

  private hold(): void {
    clearTimeout(this.holdTimer);
    this.holdTimer = undefined;
    const { content, base, attempts } = this;
    const isSent = !this.isUnsent();
    const isHeld = this.ports.hold({
      content,
      version: base.version,
      isSent,
      known: [base.mark, ...attempts],
      at: Date.now(),
    });
    if (isHeld !== this.state.isHeld) this.tell({ ...this.state, isHeld });
  }

  private sendSoon(): void {
    const waited = this.unsentSince === null ? 0 : Date.now() - this.unsentSince;
    clearTimeout(this.sendTimer);
    this.sendTimer = setTimeout(() => this.send(), Math.max(0, Math.min(REST_MS, REST_AT_MOST_MS - waited)));
  }

  private send(): void {
    clearTimeout(this.sendTimer);
    if (this.underWay || this.isPaused) return;
    if (!this.isUnsent()) return this.settle();
    this.underWay = this.write().finally(() => {
      this.underWay = null;
      if (this.state.phase.kind === 'saving') this.sendSoon();
    });
  }

  private async write(): Promise<void> {
    const { content } = this;
    const mark = contentMark(content);
    this.unsentSince = null;
    if (!this.attempts.includes(mark)) this.attempts.push(mark);
    // Should the page end now, the next one knows this content for its own.
    this.hold();
    try {
      const copy = await this.ports.write(content, this.base.version);
      this.accept(copy, mark);
    } catch (error) {
      await this.failed(error);
    }
  }

  private accept(copy: WorkingCopy, mark: string): void {
    this.failures = 0;
    this.attempts = [];
    this.base = { version: copy.version, mark };
    this.ports.acknowledged?.(copy);
    this.settle();
  }

  /** Kept where nothing is unsent, else on its way. */
  private settle(): void {
    this.hold();
    if (!this.isUnsent()) {
      this.unsentSince = null;
      this.enter({ kind: 'kept', at: Date.now() });
      return;
    }
    this.enter({ kind: 'saving' });
    if (!this.underWay) this.sendSoon();
  }

  private async failed(error: unknown): Promise<void> {
    if (isProblem(error, 'EDIT_CONFLICT')) return this.met();
    if (this.ports.isSignedOut(error)) return this.enter({ kind: 'signed-out' });
    const isPassing = error instanceof Unreachable || (error instanceof ApiProblem && isWorthRetrying(error.status));
    if (isPassing) return this.retryLater();
    // Refused for good: this content was judged and not written.
    this.enter({ kind: 'refused', why: problemSentence(error) });
  }

  /** Somebody was first: perhaps this page itself, in a call whose answer was lost. */
  private async met(): Promise<void> {
    let theirs: WorkingCopy;
    let mark: string;
    try {
      theirs = await this.ports.read();
      mark = contentMark(contentOfWorking(theirs));
    } catch (error) {
      return this.failed(error);
    }
    const isOwn = this.attempts.includes(mark) || mark === this.base.mark || mark === contentMark(this.content);
    if (isOwn) return this.accept(theirs, mark);
    this.hold();
    this.enter({ kind: 'conflict', theirs });
  }

  private retryLater(): void {
    const wait = Math.min(FIRST_RETRY_MS * 2 ** this.failures++, LAST_RETRY_MS);
    this.enter({ kind: 'offline' });
    clearTimeout(this.sendTimer);
    this.sendTimer = setTimeout(() => this.send(), wait);
  }

  private enter(phase: SavePhase): void {
    if (phase.kind === this.state.phase.kind && phase.kind === 'saving') return;
    this.tell({ ...this.state, phase });
  }

  private tell(state: SaverState): void {
    this.state = state;
    this.listeners.forEach((listener) => listener());
  }
}

function isWorthRetrying(status: number): boolean {
  return status >= 500 || status === 429;
}

function whyUnsaved(phase: SavePhase): string {
  switch (phase.kind) {
    case 'offline':
      return 'Your last changes have not reached the server: no connection. They are held in this browser.';
    case 'signed-out':
      return 'Your last changes have not reached the server: sign in again.';
    case 'refused':
      return `The server did not take your last changes: ${phase.why}`;
    case 'conflict':
      return 'Somebody else changed the study. Choose first which changes stay.';
    default:
      return 'Your last changes have not reached the server yet.';
  }
}
