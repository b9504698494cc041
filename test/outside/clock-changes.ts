/** Everything is drawn anew, the same way each time; DEEP=1 draws ten times as much. */
export const SEED = 20261201;
const deep = process.env['DEEP'] === '1';
export const runs = (count: number) => ({ seed: SEED, numRuns: deep ? count * 10 : count });

/** Milliseconds after which a test is given up: far more than it needs, also on a machine with other work. */
export const PATIENCE = deep ? 900_000 : 180_000;

/** Dates around which a zone's clock does something; that it does is a test in wall-clock.spec.ts. */
export const CHANGES: [zone: string, date: string][] = [
  ['Europe/Berlin', '2026-03-29'],
  ['Europe/Berlin', '2026-10-25'],
  ['Europe/Dublin', '2026-10-25'],
  ['America/New_York', '2026-03-08'],
  ['America/New_York', '2026-11-01'],
  ['Australia/Lord_Howe', '2026-04-05'], // half an hour
  ['Australia/Lord_Howe', '2026-10-04'],
  ['Pacific/Chatham', '2026-04-05'], // offsets with 45 minutes
  ['Pacific/Chatham', '2026-09-27'],
  ['Antarctica/Troll', '2026-03-29'], // two hours
  ['Africa/Casablanca', '2026-02-15'],
  ['America/Sao_Paulo', '2018-11-04'], // midnight is skipped
  ['America/Sao_Paulo', '2018-02-18'], // the hour before midnight comes twice
  ['Africa/Cairo', '2026-04-24'],
  ['Africa/Cairo', '2026-10-30'],
  ['America/Santiago', '2026-09-06'],
  ['Asia/Beirut', '2026-03-29'],
  ['America/Havana', '2026-11-01'],
  ['America/St_Johns', '2010-03-14'], // one minute past midnight
  ['America/St_Johns', '2010-11-07'],
  ['Asia/Kathmandu', '1986-01-01'], // a quarter of an hour
  ['Pacific/Apia', '2011-12-30'], // a whole day
  ['Pacific/Kwajalein', '1993-08-21'],
];
/** Dates around which no clock changes. */
export const STEADY: [zone: string, date: string][] = [
  ['UTC', '2026-12-01'],
  ['Asia/Kolkata', '2026-12-01'],
  ['Europe/Berlin', '2028-02-29'],
];
