/** Lengths are whole nanometres, in which both a micrometre and 1/64 inch (396,875 of them) are exact. */
export type Nanometres = bigint;

/** How a shop writes lengths. */
export type LengthUnit = 'MILLIMETRE' | 'INCH';

export const MILLIMETRE: Nanometres = 1_000_000n;
/** 25.4 mm by definition since 1959 (international yard and pound agreement). */
export const INCH: Nanometres = 25_400_000n;
const SIXTY_FOURTH: Nanometres = 396_875n;
/** Ten thousand metres, in nanometres: anything longer is a slip of the finger. */
const LONGEST: Nanometres = 10_000_000n * MILLIMETRE;

export type LengthProblem =
  | 'EMPTY'
  | 'NOT_A_LENGTH'
  | 'UNKNOWN_UNIT'
  | 'AMBIGUOUS_COMMA'
  | 'FRACTION_NEEDS_INCHES'
  | 'NOT_A_RULE_FRACTION'
  | 'TOO_FINE'
  | 'TOO_LONG';

export type ParsedLength =
  | { readonly ok: true; readonly length: Nanometres; readonly unit: LengthUnit }
  | { readonly ok: false; readonly problem: LengthProblem };

const VULGAR: Readonly<Record<string, string>> = {
  '½': '1/2',
  '¼': '1/4',
  '¾': '3/4',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
};

const UNITS: Readonly<Record<string, { unit: LengthUnit; size: Nanometres }>> = {
  mm: { unit: 'MILLIMETRE', size: MILLIMETRE },
  cm: { unit: 'MILLIMETRE', size: 10n * MILLIMETRE },
  m: { unit: 'MILLIMETRE', size: 1_000n * MILLIMETRE },
  in: { unit: 'INCH', size: INCH },
  inch: { unit: 'INCH', size: INCH },
  inches: { unit: 'INCH', size: INCH },
  '"': { unit: 'INCH', size: INCH },
};

/**
 * Reads a length as people type it: `600`, `600 mm`, `23,5 mm`, `60 cm`, `3 5/16"`, `3-5/16 in`, `3½"`, `3.3125 in`.
 * A number without a unit is in `assumed`. Exact or refused: nothing is rounded.
 */
export function parseLength(text: string, assumed: LengthUnit): ParsedLength {
  const plain = normalise(text);
  if (plain === '') return refused('EMPTY');
  const parts = /^([\d.,/ -]+?)\s*([a-z"']*)$/.exec(plain);
  if (!parts || plain.length > 40) return refused('NOT_A_LENGTH');
  const [, amount = '', suffix = ''] = parts;
  const unit =
    suffix === ''
      ? assumed === 'INCH'
        ? UNITS['in']
        : UNITS['mm']
      : Object.hasOwn(UNITS, suffix)
        ? UNITS[suffix]
        : undefined;
  if (!unit) return refused('UNKNOWN_UNIT');
  const length = amount.includes('/')
    ? unit.unit === 'INCH'
      ? readFraction(amount)
      : 'FRACTION_NEEDS_INCHES'
    : readDecimal(amount, unit.size);
  if (typeof length === 'string') return refused(length);
  if (length > LONGEST) return refused('TOO_LONG');
  return { ok: true, length, unit: unit.unit };
}

/**
 * Writes a length: millimetres to the hundredth (`23.5 mm`), or inches to the nearest 1/64 (`3 5/16 in`).
 * What is written is for reading; what is stored stays exact.
 */
export function formatLength(length: Nanometres, unit: LengthUnit): string {
  return unit === 'INCH' ? `${inches(length)} in` : `${hundredths(length)} mm`;
}

/** The same without the unit, for a row of lengths that share one: `400 × 300 × 38 mm`. */
export function formatAmount(length: Nanometres, unit: LengthUnit): string {
  return unit === 'INCH' ? inches(length) : hundredths(length);
}

function refused(problem: LengthProblem): ParsedLength {
  return { ok: false, problem };
}

function normalise(text: string): string {
  return text
    .replace(/[½¼¾⅛⅜⅝⅞]/g, (sign) => ` ${VULGAR[sign] ?? ''}`)
    .replace(/[″”“]|''|′′/g, '"')
    .replace(/⁄/g, '/')
    .replace(/[‐‑–−]/g, '-')
    .replace(/\s+/g, ' ')
    .trim()
    .toLowerCase();
}

/** `5/16`, `3 5/16` or `3-5/16` of an inch; the denominators are those on a rule, so the result is exact. */
function readFraction(text: string): Nanometres | LengthProblem {
  const parts = /^(?:(\d{1,6})[ -]\s?)?(\d{1,4})\/(\d{1,4})$/.exec(text);
  if (!parts) return 'NOT_A_LENGTH';
  const [whole, top, bottom] = [parts[1] ?? '0', parts[2] ?? '', parts[3] ?? ''].map(BigInt) as [
    bigint,
    bigint,
    bigint,
  ];
  if (bottom === 0n) return 'NOT_A_LENGTH';
  if (![2n, 4n, 8n, 16n, 32n, 64n].includes(bottom)) return 'NOT_A_RULE_FRACTION';
  return whole * INCH + (top * INCH) / bottom;
}

function readDecimal(text: string, size: Nanometres): Nanometres | LengthProblem {
  if (/^\d{1,3}(,\d{3})+$/.test(text)) return 'AMBIGUOUS_COMMA';
  const parts = /^(\d{1,12})(?:[.,](\d{1,12}))?$/.exec(text);
  if (!parts) return 'NOT_A_LENGTH';
  const decimals = parts[2] ?? '';
  const scale = 10n ** BigInt(decimals.length);
  const scaled = BigInt((parts[1] ?? '') + decimals) * size;
  return scaled % scale === 0n ? scaled / scale : 'TOO_FINE';
}

function hundredths(length: Nanometres): string {
  const rounded = nearest(length, MILLIMETRE / 100n);
  const digits = (rounded < 0n ? -rounded : rounded).toString().padStart(3, '0');
  const decimals = digits.slice(-2).replace(/0+$/, '');
  return `${rounded < 0n ? '-' : ''}${digits.slice(0, -2)}${decimals === '' ? '' : `.${decimals}`}`;
}

function inches(length: Nanometres): string {
  const negative = length < 0n;
  const all = nearest(negative ? -length : length, SIXTY_FOURTH);
  const whole = all / 64n;
  let [top, bottom] = [all % 64n, 64n];
  while (top > 0n && top % 2n === 0n) [top, bottom] = [top / 2n, bottom / 2n];
  const fraction = top === 0n ? '' : `${top}/${bottom}`;
  const words = [whole === 0n && fraction !== '' ? '' : String(whole), fraction];
  return (negative && all > 0n ? '-' : '') + words.filter((word) => word !== '').join(' ');
}

/** How many steps, rounded half away from zero. */
function nearest(length: Nanometres, step: Nanometres): bigint {
  const half = length < 0n ? -step / 2n : step / 2n;
  return (length + half) / step;
}
