import { defineConfig } from 'drizzle-kit';

/** Paths are relative to the repository's root, where the commands run. */
export default defineConfig({
  dialect: 'postgresql',
  schema: './drizzle/tables/*.ts',
  out: process.env['MIGRATIONS_INTO'] ?? './drizzle/migrations',
});
