// The import and purity rules of eslint.config.mjs still bite: one-line offenders, each caught by its rule by name and message.
import { ESLint } from 'eslint';
import { describe, expect, it } from 'vitest';

const paths = 'import-x/no-restricted-paths';

const offenders: [file: string, code: string, rule: string][] = [
  [
    'solver/mesh/x.ts',
    "import { startingPoints } from '@/lib/domain/starting-points';\nexport const x = startingPoints;",
    paths,
  ],
  [
    'solver/mesh/x.ts',
    "import { readFileSync } from 'node:fs';\nexport const x = readFileSync;",
    'no-restricted-imports',
  ],
  ['solver/mesh/x.ts', 'export const x = Math.random();', 'no-restricted-properties'],
  ['solver/mesh/x.ts', 'export const x = window;', 'no-restricted-globals'],
  ['solver/mesh/x.ts', "throw new Error('x');\nexport const x = 1;", 'no-restricted-syntax'],
  ['solver/mesh/x.ts', 'export function f(): number { return 1; }', 'jsdoc/require-jsdoc'],
  ['lib/domain/x.ts', "import { a } from '@/solver';\nexport const x = a;", paths],
  ['lib/domain/x.ts', "import { list } from '@/lib/server/projects';\nexport const x = list;", paths],
  ['lib/domain/x.ts', 'export const x = Date.now();', 'no-restricted-properties'],
  ['lib/domain/x.ts', "import { e } from '@/lib/errors';\nexport const x = e;", paths],
  ['lib/hand-methods/x.ts', "import { a } from '@/solver';\nexport const x = a;", paths],
  ['lib/checks/x.ts', "import { list } from '@/lib/server/projects';\nexport const x = list;", paths],
  ['lib/analysis/x.ts', "import { db } from '@/db/client';\nexport const x = db;", paths],
  ['db/queries/x.ts', "import { list } from '@/lib/server/projects';\nexport const x = list;", paths],
  ['lib/server/x.ts', "import { cn } from '@/components/ui/button';\nexport const x = cn;", paths],
  [
    'lib/server/x.ts',
    "import { Lucia } from 'lucia';\nexport const x = Lucia;",
    '@typescript-eslint/no-restricted-imports',
  ],
  [
    'components/ui/x.tsx',
    "import { readSection } from '@/lib/domain/validate';\nexport const x = readSection;",
    paths,
  ],
  ['components/ui/x.tsx', "import { e } from '@/lib/errors';\nexport const x = e;", paths],
  ['components/editor/kernels/x.ts', "import { e } from '@/lib/errors';\nexport const x = e;", paths],
  ['components/editor/x.tsx', "import { list } from '@/lib/server/projects';\nexport const x = list;", paths],
  [
    'components/editor/x.tsx',
    "import { a } from '@/solver/mesh/mesh';\nexport const x = a;",
    'no-restricted-imports',
  ],
  ['components/editor/x.tsx', 'export default 1;', 'import-x/no-default-export'],
  ['app/(workspace)/projects/x.tsx', "import { db } from '@/db/client';\nexport const x = db;", paths],
  ['lib/format/x.ts', "import { list } from '@/lib/server/projects';\nexport const x = list;", paths],
  ['lib/format/x.ts', "import { e } from '@/lib/errors';\nexport const x = e;", paths],
  ['lib/paths.ts', "import { a } from '@/solver';\nexport const x = a;", paths],
];

describe('the lint rules bite', () => {
  const eslint = new ESLint();
  it.each(offenders)('%s: %s', { timeout: 60_000 }, async (filePath, code, rule) => {
    const [report] = await eslint.lintText(code, { filePath });
    const caught = report!.messages.filter((message) => message.ruleId === rule);
    expect(caught.map((message) => message.message)).not.toEqual([]);
    // a broken zone reports a configuration error under the same rule name
    if (rule === paths) expect(caught[0]!.message).toContain('DEVELOPERS.md');
  });
});
