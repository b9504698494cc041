import { describe, expect, it } from 'vitest';
import { hoursSchema } from './hours-schema';
import { addDays } from './zone';

const day = [{ from: 480, to: 1020 }];
const week = [day, day, day, day, day, [], []];

function sentences(weekly: unknown, exceptions: unknown = []): string[] {
  const parsed = hoursSchema.safeParse({ weekly, exceptions });
  return (parsed.error?.issues ?? []).map((issue) => `${issue.path.join('.')}: ${issue.message}`);
}

const monday = (spans: unknown) => [spans, ...week.slice(1)];
const dates = (count: number) =>
  Array.from({ length: count }, (_, i) => ({ date: addDays('2026-12-01', i), spans: [] }));

describe('the hours form', () => {
  it('takes ordinary weeks, spans that touch, whole days and closed dates', () => {
    expect(sentences(week)).toEqual([]);
    expect(sentences(Array(7).fill([]))).toEqual([]);
    expect(sentences(Array(7).fill([{ from: 0, to: 1440 }]))).toEqual([]);
    const split = [
      { from: 480, to: 720 },
      { from: 720, to: 1020 },
    ];
    expect(sentences(monday(split), [{ date: '2026-12-24', spans: [], reason: ' Eve ' }])).toEqual(
      [],
    );
    const six = [0, 1, 2, 3, 4, 5].map((i) => ({ from: i * 60, to: i * 60 + 1 }));
    expect(sentences(monday(six), dates(400))).toEqual([]);
  });

  it.each([
    [[{ from: 600, to: 600 }], '0.0: Work must end after it begins, on the same day.'],
    [[{ from: 1020, to: 480 }], '0.0: Work must end after it begins, on the same day.'],
    [[{ from: -1, to: 480 }], '0.0.from: A day begins at 00:00.'],
    [[{ from: 480, to: 1441 }], '0.0.to: A day ends at 24:00.'],
    [[{ from: 480.5, to: 1020 }], '0.0.from: Times are to the minute.'],
    [[{ from: '08:00', to: 1020 }], '0.0.from: Give a time of day, like 07:30.'],
    [[{ from: 480, to: null }], '0.0.to: Give a time of day, like 07:30.'],
    [[{ from: 480, to: Number.NaN }], '0.0.to: Give a time of day, like 07:30.'],
    [
      [
        { from: 480, to: 720 },
        { from: 719, to: 1020 },
      ],
      '0: The spans of a day must follow one another without overlapping.',
    ],
    [
      [
        { from: 800, to: 1020 },
        { from: 480, to: 720 },
      ],
      '0: The spans of a day must follow one another without overlapping.',
    ],
    [
      [0, 1, 2, 3, 4, 5, 6].map((i) => ({ from: i * 60, to: i * 60 + 30 })),
      '0: A day has six spans at most.',
    ],
  ])('says what is wrong with %j', (spans, sentence) => {
    expect(sentences(monday(spans))).toEqual([`weekly.${sentence}`]);
    expect(sentences(week, [{ date: '2026-12-24', spans }])).toEqual([
      `exceptions.0.spans${sentence.slice(1)}`,
    ]);
  });

  it('says what is wrong with weeks and exceptions', () => {
    expect(sentences(week.slice(1))).toEqual(['weekly: A week has seven days.']);
    expect(sentences(week, [{ date: '2026-02-29', spans: [] }])).toEqual([
      'exceptions.0.date: This is not a date.',
    ]);
    expect(sentences(week, [{ spans: [] }])).toEqual(['exceptions.0.date: This is not a date.']);
    expect(sentences(week, [...dates(2), ...dates(1)])).toEqual([
      'exceptions: A date can have one exception only.',
    ]);
    expect(sentences(week, dates(401))).toEqual([
      'exceptions: There can be 400 exceptions at most.',
    ]);
    expect(sentences(week, [{ date: '2026-12-24', spans: [], reason: 'x'.repeat(61) }])).toEqual([
      'exceptions.0.reason: Keep the reason under 60 characters.',
    ]);
  });
});
