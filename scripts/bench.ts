// npm run --silent bench -- [CASE ...]: one JSON object a line. Medians of 7 in one warm process; compare ratios within one run,
// never times across runs.
import { problemOf } from '@/lib/analysis/problems';
import { drag, ensemble, growth, million, pileToAccuracy } from './bench/section-cases';
import { matrix } from './bench/matrix-case';

const cases: Record<string, (args: string[]) => object> = {
  'pile-to-accuracy': pileToAccuracy,
  drag,
  ensemble,
  growth,
  million,
  matrix,
};

/** Cases that run when none is named: all that need no file, smallest first. */
const standard = ['pile-to-accuracy', 'drag', 'ensemble', 'growth', 'million'];

function refuse(detail: string): never {
  process.stderr.write(`${JSON.stringify(problemOf('invalid-input', detail), null, 2)}\n`);
  process.exit(2);
}

const args = process.argv.slice(2);
const names = args.length > 0 ? args : standard;
for (let i = 0; i < names.length; i++) {
  const name = names[i]!;
  const run = cases[name];
  if (!run) refuse(`There is no case “${name}”; there are ${Object.keys(cases).join(', ')}.`);
  const file = name === 'matrix' ? names[++i] : undefined;
  if (name === 'matrix' && file === undefined)
    refuse('The case matrix needs a file in Matrix Market form: matrix FILE.mtx.');
  try {
    const result = run(file === undefined ? [] : [file]);
    process.stdout.write(`${JSON.stringify({ case: name, ...result })}\n`);
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    refuse(error.message);
  }
}
