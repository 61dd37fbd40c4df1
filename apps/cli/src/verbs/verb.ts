import type { ExitStatus } from '../exit-status.js';
import type { Session } from '../session.js';

/** What a plan may depend on besides the command line itself. */
export interface Machine {
  /** Processors that this process may use: the default of --threads. */
  readonly processors: number;
}

/** Arguments and options as the parser leaves them: text, flags and lists of text. */
export type RawOptions = Readonly<Record<string, unknown>>;

/** A verb: a pure plan, and the effect that carries a plan out and says how it ended. */
export interface Verb<Plan> {
  readonly plan: (raw: RawOptions, machine: Machine) => Plan;
  readonly effect: (plan: Plan, session: Session) => Promise<ExitStatus>;
}
