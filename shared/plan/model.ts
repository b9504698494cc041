import type { ClampClass } from '#shared/floor/model';
import type { Calendar } from '#shared/time/calendar';
import type { Instant } from '#shared/time/instant';

/** A link from an activity that comes before: elapsed minutes after its end, at least and at most. */
export interface Link {
  from: string;
  minMinutes: number;
  maxMinutes: number | null;
  /** The wait that the link stands for; null for plain order. */
  wait: string | null;
}

/** A link whose beginning is a fact: not before one instant, not after another. */
export interface FactLink {
  notBefore: Instant;
  notAfter: Instant | null;
  wait: string | null;
}

/** Units of a station, or clamps of at least a length, from the start of one activity to the end of another. */
export interface Need {
  kind: 'STATION' | 'CLAMPS';
  /** A station's key; empty for clamps. */
  station: string;
  units: number;
  /** For clamps: nanometres that a class must reach. */
  length: bigint;
  /** The activity at whose end it is given back; the taker itself for a need that lasts as long as the work. */
  until: string;
}

export interface Activity {
  /** `<batch>/<step>/<piece>`. */
  id: string;
  batchId: string;
  step: string;
  piece: number;
  name: string;
  /** Working minutes still to do. */
  minutes: number;
  pausable: boolean;
  people: number;
  skill: string | null;
  needs: readonly Need[];
  links: readonly Link[];
  facts: readonly FactLink[];
  /** Work under way: it goes on now, with whoever began it. */
  started: { at: Instant; person: string | null } | null;
  /** The end of a batch: takes no time and no one, closed hours or not. */
  isEnd: boolean;
}

/** Something that batches keep occupied now, until an activity ends. */
export interface OpenHold {
  kind: 'STATION' | 'CLAMPS';
  /** A station's or a clamp class's key. */
  key: string;
  batchId: string;
  units: number;
  until: string;
}

export interface Person {
  id: string;
  skills: readonly string[];
  calendar: Calendar;
}

export interface PlannedStation {
  key: string;
  name: string;
  capacity: number;
}

export interface PlannedBatch {
  id: string;
  code: string;
  dueInstant: Instant | null;
  shipBy: string | null;
}

/** One shop's planning problem. Instants are milliseconds; work advances in its people's calendars only. */
export interface Problem {
  now: Instant;
  horizonEnd: Instant;
  activities: readonly Activity[];
  holds: readonly OpenHold[];
  stations: readonly PlannedStation[];
  clamps: readonly ClampClass[];
  people: readonly Person[];
  batches: readonly PlannedBatch[];
}

/** What kept an activity from starting earlier. */
export type Reason =
  | { code: 'NOW' }
  | { code: 'AFTER'; activity: string }
  | { code: 'WAIT'; wait: string; until: Instant }
  | { code: 'STATION'; station: string }
  | { code: 'CLAMPS' }
  | { code: 'PEOPLE' }
  | { code: 'HOURS' }
  | { code: 'FRESH' };

export interface Placement {
  activity: string;
  start: Instant;
  end: Instant;
  people: string[];
  /** Clamps taken at the start, by class. */
  clamps: { key: string; units: number }[];
  reason: Reason;
}

export interface Plan {
  placements: Placement[];
  /** Batches that cannot be planned, with the reason in a code. */
  unplanned: { batchId: string; reason: UnplannedReason }[];
  /** Links whose maximum could not be kept, with how late the later activity starts. */
  missedMaxima: { activity: string; wait: string | null; lateMinutes: number }[];
}

export type UnplannedReason =
  | { code: 'NO_PERSON'; step: string; skill: string | null; people: number }
  | { code: 'NO_SPAN'; step: string; minutes: number }
  | { code: 'TOO_FEW_CLAMPS'; step: string; needed: number; owned: number }
  | { code: 'STATION_TOO_SMALL'; step: string; station: string; needed: number; capacity: number };
