import { cp, mkdir, readdir, readFile, rm } from 'node:fs/promises';
import path from 'node:path';
import { run } from '../../server/launch/children.mjs';
import { root } from '../../server/launch/root.mjs';

const COPY = 'dist/generated';
const TYPES = ['apps/web/src/app/graphql/generated', 'server/generated'];
const MIGRATIONS = 'drizzle/migrations';

/** Generates everything once more beside the work tree and compares: 3 checks, each says which command mends it. */
export async function generated() {
  const into = path.join(root, COPY);
  await rm(into, { recursive: true, force: true });
  await mkdir(into, { recursive: true });
  try {
    const checks = [...(await checkTypes()), await checkMigrations()];
    const failures = checks.filter((one) => one !== null);
    return {
      passed: checks.length - failures.length,
      failed: failures.length,
      output: failures.join('\n'),
    };
  } finally {
    await rm(into, { recursive: true, force: true });
  }
}

async function checkTypes() {
  const script = 'node_modules/@graphql-codegen/cli/esm/bin.js';
  const { code, output } = await run(process.execPath, [script, '--config=codegen.ts'], {
    cwd: root,
    env: { ...process.env, CODEGEN_INTO: COPY },
    cap: 120,
  });
  if (code !== 0) return TYPES.map(() => `code generation failed\n${output}`);
  return Promise.all(
    TYPES.map(async (folder) => {
      const differing = await compare(path.join(root, folder), path.join(root, COPY, folder));
      return differing.length === 0
        ? null
        : `${folder} is not what schema/ and the documents generate (${differing.join(', ')}): run "npm run codegen"`;
    }),
  );
}

async function checkMigrations() {
  const copy = path.join(COPY, MIGRATIONS);
  await cp(path.join(root, MIGRATIONS), path.join(root, copy), { recursive: true });
  const args = [
    'node_modules/drizzle-kit/bin.cjs',
    'generate',
    '--config=drizzle/drizzle.config.ts',
  ];
  const { code, output } = await run(process.execPath, args, {
    cwd: root,
    env: { ...process.env, MIGRATIONS_INTO: `./${copy}` },
    cap: 120,
  });
  if (code !== 0) return `generating migrations failed\n${output}`;
  const differing = await compare(path.join(root, MIGRATIONS), path.join(root, copy));
  return differing.length === 0
    ? null
    : `drizzle/tables has changes without a migration (${differing.join(', ')}): run "npm run db:generate"`;
}

/** Names below two folders whose contents differ or that only one of them has. */
export async function compare(one, other) {
  const names = new Set([...(await namesBelow(one)), ...(await namesBelow(other))]);
  const differing = [];
  for (const name of names) {
    const [a, b] = await Promise.all([read(path.join(one, name)), read(path.join(other, name))]);
    if (a !== b) differing.push(name);
  }
  return differing.sort();
}

async function namesBelow(folder) {
  const entries = await readdir(folder, { withFileTypes: true, recursive: true }).catch(() => []);
  return entries
    .filter((entry) => entry.isFile())
    .map((entry) => path.relative(folder, path.join(entry.parentPath ?? entry.path, entry.name)));
}

const read = (file) => readFile(file, 'utf8').catch(() => null);
