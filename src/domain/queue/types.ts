/** What is known of one member when the queue is made. Moments are `Date`, days are ISO dates. */
export interface QueueFacts {
  readonly memberId: string;
  readonly name: string;
  readonly openAlerts: readonly {
    readonly kind: 'warning-sign' | 'pain';
    readonly words: string;
    readonly at: Date;
  }[];
  readonly hold: { readonly since: Date; readonly cause: string; readonly reason: string } | null;
  /** The oldest check-in without an answer. */
  readonly unanswered: { readonly sentAt: Date; readonly weekStart: string } | null;
  /** The oldest message that the coach has not read. */
  readonly unreadMessages: { readonly since: Date } | null;
  /** Null: no session yet. */
  readonly daysSinceSession: number | null;
  /** Null: the member was not training last week. */
  readonly sessionsLastWeek: number | null;
  /** A test whose verdict is `really lower`. */
  readonly realDrop: { readonly test: string; readonly sentence: string } | null;
  readonly testDayDue: boolean;
  /** Landings running without a real gain. */
  readonly stalledLandings: number;
  readonly rungReady: { readonly movement: string } | null;
  readonly firstWeek: boolean;
  readonly payment: 'ok' | 'past-due' | 'lapsed';
  /** When the yearly readiness questions run out. */
  readonly questionsDueOn: string | null;
}

export type ReasonCode =
  | 'warning-sign'
  | 'pain'
  | 'held'
  | 'held-long'
  | 'unanswered'
  | 'message'
  | 'real-drop'
  | 'missed'
  | 'stalled'
  | 'rung-ready'
  | 'test-day'
  | 'questions'
  | 'first-week'
  | 'payment';

export interface QueueReason {
  readonly code: ReasonCode;
  /** Heavier comes first. */
  readonly weight: number;
  readonly sentence: string;
  readonly since: Date | null;
}

/** The glyph that stands before a member in the queue. */
export type QueueKind = 'stop' | 'caret' | 'stair' | 'rule' | 'caution';

export interface QueueEntry {
  readonly memberId: string;
  readonly name: string;
  readonly kind: QueueKind;
  /** Heaviest first. */
  readonly reasons: readonly [QueueReason, ...QueueReason[]];
  /** When the promise runs out, or the moment of an open alert; null when nothing falls due. */
  readonly dueAt: Date | null;
  /** The weight of the first reason; equal ones are told apart by the next reasons, by age, then by name. */
  readonly score: number;
}
