import type { CodegenConfig } from '@graphql-codegen/cli';

/** Where the files go: the work tree, or a copy that is compared with it. */
const into = process.env['CODEGEN_INTO'] ?? '.';

const scalars = {
  ID: 'string',
  DateTime: 'string',
  Date: 'string',
  Length: 'string',
  Cursor: 'string',
};

/** Both sides' types from the one contract in schema/. */
const config: CodegenConfig = {
  schema: 'schema/*.graphql',
  generates: {
    [`${into}/apps/web/src/app/graphql/generated/`]: {
      documents: 'apps/web/src/**/*.graphql',
      preset: 'client',
      presetConfig: { fragmentMasking: false },
      config: { scalars, strictScalars: true, useTypeImports: true, enumsAsTypes: true },
    },
    [`${into}/server/generated/schema.ts`]: {
      plugins: ['typescript', 'typescript-resolvers'],
      config: {
        scalars,
        strictScalars: true,
        useTypeImports: true,
        enumsAsTypes: true,
        // The backslash keeps the generator from splitting "#server" at its "#".
        contextType: '\\#server/http/context#Context',
      },
    },
  },
  ignoreNoDocuments: true,
};

export default config;
