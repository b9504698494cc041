import { describe, expect, it } from 'vitest';
import { codeRules } from './code-rules';
import { importRules } from './import-rules';
import { repositoryFiles } from './repository';
import { schemasWithoutRoom } from './schema-rooms';
import { textRules } from './text-rules';

const files = repositoryFiles();
const rules = [...importRules, ...codeRules, ...textRules];

describe('the repository', () => {
  it('is seen whole', () => {
    const paths = files.map((file) => file.path);
    expect(paths).toContain('package.json');
    expect(paths).toContain('schema/base.graphql');
  });

  it.each(rules.map((rule) => [rule.name, rule] as const))('%s', (_, rule) => {
    const offences = files.flatMap((file) =>
      rule.check(file).map((what) => `${file.path}: ${what}`),
    );
    expect(offences, rule.instead).toEqual([]);
  });

  it('has a room in server/ for every file in schema/', () => {
    const without = schemasWithoutRoom(files.map((file) => file.path));
    expect(without, 'put its resolvers into a folder of the same name').toEqual([]);
  });
});

describe('each rule can fail', () => {
  it.each(rules.map((rule) => [rule.name, rule] as const))('%s', (_, rule) => {
    expect(rule.bad.length).toBeGreaterThan(0);
    for (const file of rule.bad) expect(rule.check(file), file.text || file.path).not.toEqual([]);
    for (const file of rule.good ?? [])
      expect(rule.check(file), file.text || file.path).toEqual([]);
  });

  it('a schema without a room', () => {
    const paths = ['schema/base.graphql', 'schema/orders.graphql', 'schema/floor.graphql'];
    expect(schemasWithoutRoom([...paths, 'server/floor/load.ts'])).toEqual(['orders']);
  });
});
