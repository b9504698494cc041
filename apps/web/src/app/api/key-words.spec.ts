import { curlExample, keyState } from './key-words';

const NOW = Date.parse('2026-12-01T13:06:00Z');

describe('the state of a key', () => {
  it('works until it runs out or is revoked', () => {
    expect(keyState({ revokedAt: null, expiresAt: null }, NOW)).toBe('works');
    expect(keyState({ revokedAt: null, expiresAt: '2026-12-01T13:06:01Z' }, NOW)).toBe('works');
    expect(keyState({ revokedAt: null, expiresAt: '2026-12-01T13:06:00Z' }, NOW)).toBe('run out');
    expect(keyState({ revokedAt: '2026-11-01T00:00:00Z', expiresAt: null }, NOW)).toBe('revoked');
  });
});

describe('the example', () => {
  it('takes the key from the environment and sends what a shell passes on unchanged', () => {
    const example = curlExample('http://localhost:4000');
    expect(example).toContain('"Authorization: Bearer $CLAMPTIDE_KEY"');
    const body = /-d '(.*)'$/s.exec(example)?.[1] ?? '';
    expect(body).not.toContain("'");
    expect(JSON.parse(body)).toMatchObject({ variables: { code: 'OR-1001' } });
  });
});
