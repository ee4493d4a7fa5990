// Section document in, result document out: one pure function behind the browser worker, the server's threads and the command line.
import { runChecks } from '@/lib/checks';
import { sectionHash } from '@/lib/domain/canonical';
import type { Criterion } from '@/lib/domain/criteria';
import { describeNumber, describePoint } from '@/lib/domain/describe';
import type { Issue } from '@/lib/domain/issue';
import type { Problem } from '@/lib/domain/problem';
import type { ResultDocument, ResultNote, SituationResult } from '@/lib/domain/result';
import type { SectionDocument, Situation } from '@/lib/domain/section';
import { type ReadOutcome, readSection } from '@/lib/domain/validate';
import { errorRow } from '@/lib/errors';
import { AnalysisMemory, type MeshedSection } from './analysis-memory';
import { buildConditions, buildMedium } from './build-problem';
import { readFields } from './draw-fields';
import type { SituationFields } from './fields';
import { problemOf, problemOfIssues } from './problems';
import { ResultReader, type SolvedSituation } from './read-results';
import { engineVersion } from './version';
import { solveStreamFunction, type SituationConditions, solveSteady } from '@/solver';

export interface AnalyzeOptions {
  /** Ids of the situations to solve; all when absent. */
  readonly situations?: readonly string[];
  readonly criteria: readonly Criterion[];
  /** `live`: one mesh of about 2 000 unknowns. `full`: refined until the tolerances hold. */
  readonly effort: 'live' | 'full';
  readonly withFields: boolean;
  /** Milliseconds, for the timings. */
  readonly now: () => number;
  readonly shouldStop?: () => boolean;
  /** Kept between calls: mesh and analysis are used again where only permeabilities or levels changed. */
  readonly memory?: AnalysisMemory;
}

export type AnalysisOutcome =
  | { readonly status: 'solved'; readonly result: ResultDocument; readonly fields: SituationFields[] }
  | { readonly status: 'refused'; readonly problem: Problem; readonly issues: Issue[] }
  | { readonly status: 'cancelled' };

/** Relative tolerances of a full solve: half the bracket of the discharge, and the last change of the exit gradient. */
const tolerances = { discharge: 0.002, exitGradient: 0.01 } as const;
const liveSize = 1.25;
const fullSizes = [1, 0.6, 0.38, 0.25] as const;
const maxElements = 60_000;

/** Solves a section. Never throws for bad input: what is wrong comes back as a problem document. */
export function analyzeSection(value: unknown, options: AnalyzeOptions): AnalysisOutcome {
  const read = readSection(value);
  if (!read.document)
    return { status: 'refused', problem: problemOfIssues(read.issues), issues: read.issues };
  const document = read.document;
  const chosen = chooseSituations(document, options.situations);
  if ('problem' in chosen) return { status: 'refused', problem: chosen.problem, issues: read.issues };
  const jobs: SituationJob[] = [];
  for (const situation of chosen.situations) {
    const outcome = buildConditions(document, situation);
    if (outcome.status === 'refused')
      return { status: 'refused', problem: outcome.problem, issues: read.issues };
    jobs.push({ situation, conditions: outcome.conditions });
  }
  return new Analysis(document, read, options).run(jobs);
}

interface SituationJob {
  readonly situation: Situation;
  readonly conditions: SituationConditions;
}

function chooseSituations(
  document: SectionDocument,
  ids: readonly string[] | undefined,
): { situations: Situation[] } | { problem: Problem } {
  if (!ids) return { situations: document.situations };
  const unknown = ids.find((id) => !document.situations.some((situation) => situation.id === id));
  if (unknown === undefined) return { situations: document.situations.filter(({ id }) => ids.includes(id)) };
  const known = document.situations.map(({ id }) => `“${id}”`).join(', ');
  const detail = `There is no situation “${unknown}” in this section; it has ${known}.`;
  return { problem: problemOf('invalid-section', detail, [{ pointer: '/situations', detail }]) };
}

/** A refusal found while solving. */
class Refusal {
  constructor(readonly problem: Problem) {}
}

class Analysis {
  private readonly memory: AnalysisMemory;
  private readonly notes: Issue[];
  private readonly began: number;

  constructor(
    private readonly document: SectionDocument,
    private readonly read: ReadOutcome,
    private readonly options: AnalyzeOptions,
  ) {
    this.memory = options.memory ?? new AnalysisMemory();
    this.notes = [...read.issues];
    this.began = options.now();
  }

  run(jobs: readonly SituationJob[]): AnalysisOutcome {
    const situations: SituationResult[] = [];
    const fields: SituationFields[] = [];
    for (const job of jobs) {
      const answer = this.solveSituation(job);
      if (answer === 'cancelled') return { status: 'cancelled' };
      if (answer instanceof Refusal)
        return { status: 'refused', problem: answer.problem, issues: this.read.issues };
      situations.push(answer.result);
      if (this.options.withFields)
        fields.push(readFields(answer.solved, answer.reader.readFlowNet(), this.options.effort === 'full'));
    }
    const result: ResultDocument = {
      format: 'underfall-result/1',
      solver: { name: 'underfall', version: engineVersion },
      section: { sha256: sectionHash(this.read.source) },
      situations,
      notes: this.notes.map(toNote),
    };
    return { status: 'solved', result, fields };
  }

  /** Solves on finer and finer meshes until the tolerances hold; keeps every level. */
  private solveSituation(job: SituationJob): Answer | Refusal | 'cancelled' {
    const sizes = this.options.effort === 'live' ? [liveSize] : fullSizes;
    const timings = { mesh: 0, assemble: 0, factorize: 0, solve: 0, total: 0 };
    const start = this.options.now();
    const levels: SituationResult['convergence']['levels'] = [];
    for (let step = 0; ; step++) {
      if (this.options.shouldStop?.()) return 'cancelled';
      const solved = this.solveOn(job, sizes[step]!, timings);
      if (solved instanceof Refusal) return solved;
      const reader = new ResultReader(this.document, solved);
      const exit = reader.readExits();
      const steepest = exit.reduce((most, face) => Math.max(most, face.max.gradient ?? face.max.averaged), 0);
      levels.push(reader.readLevel(exit.length > 0 ? steepest : null));
      const errors = measureErrors(levels, reader);
      const isLast = step === sizes.length - 1 || this.memory.isAtLimit(sizes[step]!);
      const isGood =
        errors.discharge <= tolerances.discharge && (errors.exitGradient ?? 1) <= tolerances.exitGradient;
      if (!isLast && !(isGood && step > 0)) continue;
      timings.total = this.options.now() - start;
      return this.finish(job, solved, reader, { exit, levels, errors, timings });
    }
  }

  private solveOn(
    job: SituationJob,
    size: number,
    timings: SituationResult['timings'],
  ): SolvedSituation | Refusal {
    const { now } = this.options;
    const t0 = now();
    const meshed = this.memory.mesh(this.document, size, maxElements);
    timings.mesh += now() - t0;
    if (meshed.status === 'refused') return new Refusal(problemOfIssues(meshed.notes));
    this.addNotes(meshed.notes);
    return this.solveMeshed(job, meshed, timings);
  }

  private solveMeshed(
    job: SituationJob,
    meshed: MeshedSection,
    timings: SituationResult['timings'],
  ): SolvedSituation | Refusal {
    const { now } = this.options;
    const t0 = now();
    const medium = this.memory.medium(buildMedium(this.document));
    const outcome = solveSteady(meshed.model, medium, job.conditions);
    timings.factorize += now() - t0;
    if (outcome.status === 'refused') return new Refusal(wordRefusal(outcome.reason, outcome.at));
    const { solution } = outcome;
    const t1 = now();
    const stream = solveStreamFunction(meshed.model, medium, job.conditions, solution);
    timings.solve += now() - t1;
    return {
      situation: job.situation,
      solution,
      stream,
      section: {
        mesh: meshed.mesh,
        kind: this.document.geometry,
        conductivities: medium.conductivities,
        conditions: job.conditions,
        heads: solution.heads,
        reactions: solution.reactions,
      },
    };
  }

  private finish(job: SituationJob, solved: SolvedSituation, reader: ResultReader, found: Found): Answer {
    const { exit, levels, errors, timings } = found;
    const { drops, channels, shapeFactor, referencePermeability } = reader.readFlowNet();
    const unchecked: Omit<SituationResult, 'checks'> = {
      id: job.situation.id,
      regime: 'confined',
      mesh: reader.readMesh(),
      discharge: reader.readDischarge(errors.discharge),
      piezometers: reader.readPiezometers(),
      exit,
      structures: reader.readStructures(),
      flowNet: { drops, channels, shapeFactor, referencePermeability },
      phreatic: null,
      convergence: { dischargeError: errors.discharge, exitGradientError: errors.exitGradient, levels },
      timings,
    };
    this.noteSuction(job, reader);
    const checks = runChecks({
      document: this.document,
      situation: job.situation,
      result: unchecked,
      criteria: this.options.criteria,
      probe: { headAt: (x, y) => reader.headAt(x, y) },
    });
    return { solved, reader, result: { ...unchecked, checks } };
  }

  private noteSuction(job: SituationJob, reader: ResultReader): void {
    const { depth, at } = reader.readSuction();
    if (depth <= 0.01) return;
    const name = job.situation.name ?? job.situation.id;
    this.addNotes([
      {
        code: 'suction',
        severity: 'check',
        pointer: '',
        at,
        message: `In “${name}” the pressure falls to ${describeNumber(Math.round(depth * 100) / 100)} m of suction near ${describePoint(at)}. That ground was taken as saturated; in truth it may drain, which lowers the flow through it.`,
      },
    ]);
  }

  private addNotes(notes: readonly Issue[]): void {
    for (const note of notes) {
      if (!this.notes.some((known) => known.code === note.code && known.message === note.message))
        this.notes.push(note);
    }
  }
}

interface Answer {
  readonly solved: SolvedSituation;
  readonly reader: ResultReader;
  readonly result: SituationResult;
}

interface Found {
  readonly exit: SituationResult['exit'];
  readonly levels: SituationResult['convergence']['levels'];
  readonly errors: { discharge: number; exitGradient: number | null };
  readonly timings: SituationResult['timings'];
}

/** Half the bracket where it is a bound, else the last change; the exit gradient's last change where there are two levels. */
function measureErrors(levels: Found['levels'], reader: ResultReader): Found['errors'] {
  const last = levels.at(-1)!;
  const before = levels.at(-2);
  const scale = last.discharge || 1;
  const change = (): number =>
    before ? Math.abs(last.discharge - before.discharge) / scale : reader.estimateDischargeError();
  const discharge = reader.isBracketed() ? (last.upper - last.lower) / 2 / scale : change();
  const exitGradient =
    before?.exitGradient && last.exitGradient
      ? Math.abs(last.exitGradient - before.exitGradient) / last.exitGradient
      : null;
  return { discharge, exitGradient };
}

function wordRefusal(
  reason: 'unconstrained' | 'conflicting-heads' | 'not-positive-definite',
  at: readonly [number, number],
): Problem {
  const where = describePoint(at);
  const details = {
    unconstrained: `The ground near ${where} is cut off from every water level, so its heads are undetermined. Add an edge there, or check for a gap between zones.`,
    'conflicting-heads': `Two different heads are prescribed in the same point ${where}. Part the edges or put a barrier between them.`,
    'not-positive-definite': `The equations lost their accuracy near ${where}: permeabilities differ too much or the drawing has slivers there. Simplify that place.`,
  };
  const { title } = errorRow('unsolvable');
  return { ...problemOf('unsolvable', details[reason], [{ pointer: '', detail: details[reason] }]), title };
}

function toNote({ code, severity, message, at, subject, pointer }: Issue): ResultNote {
  return {
    code,
    severity,
    message,
    ...(at ? { at: [at[0], at[1]] } : {}),
    ...(subject !== undefined ? { subject } : {}),
    pointer,
  };
}
