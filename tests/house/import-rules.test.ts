import { ESLint } from 'eslint';
import { describe, expect, it } from 'vitest';

/**
 * The house's import rules, tried one by one: for each row of the table in DEVELOPERS.md a file of that folder
 * imports what it must not, and the lint must say so; beside it, what the folder lives on must pass.
 */
const eslint = new ESLint();

const RULES = ['no-restricted-imports', 'no-restricted-syntax'];

/** What the import rules say about a source text, as if it stood in `file`. */
async function complaints(file: string, source: string): Promise<string[]> {
  const [result] = await eslint.lintText(source, { filePath: file });
  const fatal = result?.messages.find((message) => message.fatal);
  if (fatal) throw new Error(`${file}: ${fatal.message}`);
  return (result?.messages ?? [])
    .filter((message) => RULES.includes(message.ruleId ?? ''))
    .map((message) => message.message);
}

const importing = (name: string) => `import { thing } from '${name}';\nexport const made = thing;\n`;

const FORBIDDEN: [file: string, imported: string, because: string][] = [
  ['shared/engine/air/probe.ts', '#shared/contracts/common.ts', 'The engine imports decimals and itself'],
  ['shared/engine/air/probe.ts', 'zod', 'The engine imports decimals and itself'],
  ['shared/engine/air/probe.ts', 'node:fs', 'The engine imports decimals and itself'],
  ['shared/engine/air/probe.ts', '#server/db/read.ts', 'The engine imports decimals and itself'],
  ['shared/engine/air/probe.ts', '#tests/support/factories.ts', 'Product code does not import tests'],
  ['shared/engine/air/probe.test.ts', '#server/db/read.ts', 'Server code stays on the server'],
  ['shared/rules/probe.ts', '#server/db/read.ts', 'Server code stays on the server'],
  ['shared/rules/probe.ts', '#src/lib/form.ts', 'Client code stays in the client'],
  ['shared/contracts/probe.ts', '#migrations/index.ts', 'Server code stays on the server'],
  ['shared/contracts/probe.ts', '#tests/support/factories.ts', 'Product code does not import tests'],
  ['src/components/ui/probe.tsx', '#src/features/desk/api.ts', 'Features are composed by routes'],
  ['src/components/ui/probe.tsx', '#server/db/read.ts', 'Server code stays on the server'],
  ['src/components/ui/probe.tsx', '#src/routes/desk.tsx', 'Only routes and app know these'],
  ['src/lib/probe.ts', '#src/features/desk/api.ts', 'Features are composed by routes'],
  ['src/lib/probe.ts', '#src/app/router.tsx', 'Only routes and app know these'],
  ['src/features/desk/probe.ts', '#src/features/chains/api.ts', 'Features are composed by routes'],
  ['src/features/desk/probe.ts', '#src/routes/desk.tsx', 'Only routes and app know these'],
  ['src/features/desk/probe.ts', '#server/routes.ts', 'Server code stays on the server'],
  ['src/routes/probe.tsx', '#server/db/read.ts', 'Server code stays on the server'],
  ['src/app/probe.tsx', '#seeders/demo.ts', 'Server code stays on the server'],
  ['src/main.tsx', '#server/config.ts', 'Server code stays on the server'],
  ['server/modules/desk/probe.ts', '#src/lib/form.ts', 'Client code stays in the client'],
  ['server/modules/desk/probe.ts', '../network/standing.ts', 'Inside a folder import from ./'],
  [
    'server/modules/desk/probe.ts',
    '#server/modules/network/standing.ts',
    'Another module is entered by its index.ts',
  ],
  ['server/modules/desk/probe.ts', '#tests/support/factories.ts', 'Product code does not import tests'],
  ['server/modules/desk/probe.routes.ts', './probe.model.ts', 'Routes call services, not models'],
  ['server/modules/desk/probe.routes.ts', 'sequelize', 'Routes know no database'],
  [
    'server/modules/desk/probe.routes.ts',
    '#server/modules/network/standing.ts',
    'Another module is entered by its',
  ],
  ['server/modules/desk/probe.routes.ts', '#src/lib/form.ts', 'Client code stays in the client'],
  ['server/modules/desk/probe.routes.ts', '../network/index.ts', 'Inside a folder import from ./'],
  [
    'server/http/probe.ts',
    '#server/modules/network/standing.ts',
    'Another module is entered by its index.ts',
  ],
  ['server/db/probe.ts', '#src/lib/form.ts', 'Client code stays in the client'],
  ['server/probe.ts', '#tests/support/test-app.ts', 'Product code does not import tests'],
];

const ALLOWED: [file: string, imported: string][] = [
  ['shared/engine/air/probe.ts', '#shared/decimal.ts'],
  ['shared/engine/air/probe.ts', '#shared/engine/errors.ts'],
  ['shared/engine/air/probe.ts', './convention.ts'],
  ['shared/engine/air/probe.test.ts', 'vitest'],
  ['shared/rules/probe.ts', '#shared/engine/index.ts'],
  ['shared/contracts/probe.ts', 'zod'],
  ['src/components/ui/probe.tsx', '#shared/decimal.ts'],
  ['src/components/ui/probe.tsx', '#src/app/paths.ts'],
  ['src/lib/probe.ts', '#shared/errors.ts'],
  ['src/features/desk/probe.ts', '#src/components/ui/button.tsx'],
  ['src/features/desk/probe.ts', './api.ts'],
  ['src/routes/probe.tsx', '#src/features/desk/api.ts'],
  ['src/app/probe.tsx', '#src/routes/desk.tsx'],
  ['server/modules/desk/probe.ts', '#server/modules/network/index.ts'],
  ['server/modules/desk/probe.ts', '#server/db/read.ts'],
  ['server/modules/desk/probe.ts', 'sequelize'],
  ['server/modules/desk/probe.routes.ts', './probe.service.ts'],
  ['server/http/probe.ts', '#server/modules/network/index.ts'],
  ['server/db/probe.ts', '#shared/canonical-json.ts'],
];

describe('an import that the house forbids', () => {
  it.each(FORBIDDEN)('%s from %s', async (file, imported, because) => {
    const said = await complaints(file, importing(imported));
    expect(said.join('\n')).toContain(because);
  });

  it('is tried in every folder that has a rule of its own', async () => {
    const { default: config } = await import('../../eslint.config.js');
    const globs = (config as { files?: string[]; rules?: Record<string, unknown> }[])
      .filter((block) => block.rules && 'no-restricted-imports' in block.rules)
      .flatMap((block) => block.files ?? []);
    const isTried = (glob: string) => FORBIDDEN.some(([file]) => matches(glob, file));
    expect(globs.filter((glob) => !isTried(glob))).toEqual([]);
    expect(globs.length).toBeGreaterThan(8);
  });
});

describe('an import that the house lives on', () => {
  it.each(ALLOWED)('%s from %s', async (file, imported) => {
    expect(await complaints(file, importing(imported))).toEqual([]);
  });
});

describe('a static write of a model', () => {
  it.each(['update', 'destroy', 'increment', 'upsert'])('%s is refused in a module', async (verb) => {
    const source = `import { Thing } from './probe.model.ts';\nawait Thing.${verb}({});\n`;
    expect((await complaints('server/modules/desk/probe.ts', source)).join()).toMatch(/go around the act/);
    expect(await complaints('server/db/probe.ts', source)).toEqual([]);
  });
});

/** Enough of a glob matcher for the patterns of this configuration. */
function matches(glob: string, file: string): boolean {
  const pattern = glob
    .replace(/[.+]/g, '\\$&')
    .replaceAll('**/', '(.+/)?')
    .replaceAll('**', '.+')
    .replace(/(?<![.)])\*/g, '[^/]*');
  return new RegExp(`^${pattern}$`).test(file);
}
