/// <reference lib="webworker" />
// The analysis in a module worker of the browser. Answers the newest question only: what waits behind it is dropped.
import { startingPoints } from '@/lib/domain/starting-points';
import { analyzeSection } from '../analyze';
import { AnalysisMemory } from '../analysis-memory';
import type { SituationFields } from '../fields';
import type { AnalysisReply, AnalysisRequest } from './messages';

const scope = self as unknown as DedicatedWorkerGlobalScope;
const memory = new AnalysisMemory();
const warmUp = new AnalysisMemory();
let waiting: AnalysisRequest | null = null;
let isScheduled = false;

// a channel's message is a task that comes after those already queued, so a burst of questions collapses into its last
const channel = new MessageChannel();
channel.port1.onmessage = () => {
  isScheduled = false;
  const request = waiting;
  waiting = null;
  if (request) answer(request);
};

scope.onmessage = ({ data }: MessageEvent<AnalysisRequest>) => {
  waiting = data;
  if (isScheduled) return;
  isScheduled = true;
  channel.port2.postMessage(null);
};

function answer(request: AnalysisRequest): void {
  const began = performance.now();
  try {
    const outcome = analyzeSection(request.document, {
      ...(request.situations ? { situations: request.situations } : {}),
      criteria: request.criteria,
      effort: request.effort,
      withFields: true,
      now: () => performance.now(),
      memory,
    });
    const reply: AnalysisReply = { ticket: request.ticket, outcome, elapsed: performance.now() - began };
    // fields are copied, not transferred: mesh arrays stay in the memory for the next question
    scope.postMessage(reply, {
      transfer: outcome.status === 'solved' ? outcome.fields.flatMap(ownBuffers) : [],
    });
  } catch (error) {
    const failure = error instanceof Error ? error.message : String(error);
    scope.postMessage({ ticket: request.ticket, failure } satisfies AnalysisReply);
  }
}

/** Buffers that belong to this answer alone; transferring those of the mesh would empty the memory. */
function ownBuffers(field: SituationFields): ArrayBuffer[] {
  return [
    field.cornerGradients,
    field.equipotentials.points,
    field.equipotentials.offsets,
    field.equipotentials.values,
    field.seepagePaths.points,
    field.seepagePaths.offsets,
    field.seepagePaths.values,
  ].map((array) => array.buffer as ArrayBuffer);
}

// the first question then meets compiled code: a cold first answer takes several times as long
for (let i = 0; i < 4; i++) {
  analyzeSection(startingPoints[0]!.document, {
    criteria: [],
    effort: 'live',
    withFields: true,
    now: () => 0,
    memory: i % 2 ? warmUp : new AnalysisMemory(),
  });
}
