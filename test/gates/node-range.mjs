/**
 * Whether a range of `engines.node` admits a version. Written here because the lock file is checked with nothing
 * installed; understands what package.json files use: `||`, spaces, `>= > <= < = ^ ~`, `x`, hyphen ranges.
 */
export function admits(range, version) {
  const wanted = parse(version);
  return range.split('||').some((part) => comparators(part.trim()).every((test) => test(wanted)));
}

const parse = (text) => {
  const [major = 0, minor = 0, patch = 0] = text
    .replace(/^[v=]/, '')
    .split('-')[0]
    .split('.')
    .map(Number);
  return [major, minor, patch];
};

const compare = (a, b) => a[0] - b[0] || a[1] - b[1] || a[2] - b[2];
const atLeast = (low) => (version) => compare(version, low) >= 0;
const below = (high) => (version) => compare(version, high) < 0;

function comparators(part) {
  const hyphen = /^(\S+)\s+-\s+(\S+)$/.exec(part);
  if (hyphen) return [...comparators(`>=${hyphen[1]}`), ...comparators(`<=${hyphen[2]}`)];
  const tokens = part
    .replace(/([<>=^~]+)\s+/g, '$1')
    .split(/\s+/)
    .filter(Boolean);
  return tokens.flatMap(comparator);
}

/** The first version after every version that a partial one such as "20" or "20.1" stands for. */
function after([major, minor, patch], given) {
  if (given === 1) return [major + 1, 0, 0];
  return given === 2 ? [major, minor + 1, 0] : [major, minor, patch + 1];
}

function comparator(token) {
  const match = /^([<>=^~]*)v?(.*)$/.exec(token);
  const sign = match[1];
  const numbers = match[2]
    .split('-')[0]
    .split('.')
    .filter((one) => /^\d+$/.test(one));
  if (numbers.length === 0) return [];
  const low = parse(numbers.join('.'));
  const end = after(low, numbers.length);
  switch (sign) {
    case '>=':
      return [atLeast(low)];
    case '>':
      return [atLeast(end)];
    case '<':
      return [below(low)];
    case '<=':
      return [below(end)];
    case '^':
      return [atLeast(low), below(low[0] > 0 ? [low[0] + 1, 0, 0] : after(low, 2))];
    case '~':
      return [atLeast(low), below(after(low, Math.min(numbers.length, 2)))];
    case '':
    case '=':
      return [atLeast(low), below(end)];
    default:
      throw new Error(`cannot read the range "${token}"`);
  }
}
