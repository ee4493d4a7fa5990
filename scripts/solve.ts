// npm run --silent solve -- FILE.json [--situation ID] [--fields FILE]
// The result document on standard output, exit 0; or one RFC 9457 problem document on standard error, exit 2.
import { readFileSync, writeFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { analyzeSection } from '@/lib/analysis/analyze';
import { packFields } from '@/lib/analysis/pack-fields';
import { problemOf, problemOfIssues } from '@/lib/analysis/problems';
import { exampleCriteria } from '@/lib/checks';
import type { Problem } from '@/lib/domain/problem';
import { parseSectionText } from '@/lib/domain/validate';

const usage = 'npm run --silent solve -- FILE.json [--situation ID] [--fields FILE]';

interface Arguments {
  readonly file: string;
  readonly situation: string | undefined;
  readonly fields: string | undefined;
}

function readArguments(argv: readonly string[]): Arguments | Problem {
  try {
    const { values, positionals } = parseArgs({
      args: [...argv],
      allowPositionals: true,
      options: { situation: { type: 'string' }, fields: { type: 'string' } },
    });
    const [file, ...more] = positionals;
    if (file === undefined) return problemOf('invalid-input', `Name a section document: ${usage}.`);
    if (more.length > 0)
      return problemOf('invalid-input', `One file at a time; “${more[0]}” is one too many: ${usage}.`);
    return { file, situation: values.situation, fields: values.fields };
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
    return problemOf('invalid-input', `${error.message.split('.')[0]}. Usage: ${usage}.`);
  }
}

function readText(file: string): string | Problem {
  try {
    return readFileSync(file, 'utf8');
  } catch (error) {
    const reasons: Record<string, string> = {
      ENOENT: 'there is no such file',
      EISDIR: 'it is a folder',
      EACCES: 'reading it is not permitted',
    };
    const code = (error as NodeJS.ErrnoException).code ?? '';
    return problemOf('invalid-input', `“${file}” cannot be read: ${reasons[code] ?? code}.`);
  }
}

function refuse(problem: Problem): never {
  process.stderr.write(`${JSON.stringify(problem, null, 2)}\n`);
  process.exit(2);
}

function main(): void {
  const args = readArguments(process.argv.slice(2));
  if (!('file' in args)) return refuse(args);
  const text = readText(args.file);
  if (typeof text !== 'string') return refuse(text);
  const read = parseSectionText(text);
  if (!read.document) return refuse(problemOfIssues(read.issues));
  const outcome = analyzeSection(read.source, {
    ...(args.situation === undefined ? {} : { situations: [args.situation] }),
    criteria: exampleCriteria,
    effort: 'full',
    withFields: args.fields !== undefined,
    now: () => performance.now(),
  });
  if (outcome.status === 'cancelled') return refuse(problemOf('timeout', 'The solve was stopped.'));
  if (outcome.status === 'refused') return refuse(outcome.problem);
  if (args.fields !== undefined) {
    try {
      writeFileSync(args.fields, `${JSON.stringify(packFields(outcome.fields))}\n`);
    } catch (error) {
      return refuse(
        problemOf(
          'invalid-input',
          `The fields cannot be written to “${args.fields}”: ${(error as Error).message}.`,
        ),
      );
    }
  }
  process.stdout.write(`${JSON.stringify(outcome.result, null, 2)}\n`);
}

// a reader that closes the pipe early (head, less) is no error of ours
process.stdout.on('error', (error: NodeJS.ErrnoException) => process.exit(error.code === 'EPIPE' ? 0 : 1));
main();
