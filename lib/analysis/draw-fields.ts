import { recoverGradients, type FlowNet, type LevelLines, traceLevels } from '@/solver';
import type { Lines, SituationFields } from './fields';
import { headRange, type SolvedSituation } from './read-results';

/** Takes what the screen draws of one solved situation. */
export function readFields(
  { situation, section, solution, stream }: SolvedSituation,
  net: FlowNet,
  withGradients: boolean,
): SituationFields {
  const { mesh, conductivities, heads } = section;
  return {
    situation: situation.id,
    order: mesh.order,
    coordinates: mesh.coordinates,
    elements: mesh.elements,
    elementMaterials: mesh.elementMaterials,
    heads,
    cornerGradients: withGradients
      ? recoverGradients(mesh, conductivities, solution.heads)
      : new Float64Array(0),
    streamFunction: stream.values,
    equipotentials: toLines(traceLevels(mesh, heads, net.headLevels)),
    seepagePaths: stream.values
      ? toLines(traceLevels(mesh, stream.values, thin(net.streamLevels)))
      : { points: new Float64Array(0), offsets: Int32Array.of(0), values: new Float64Array(0) },
    headRange: headRange(section),
  };
}

/** More seepage paths than this turn the picture black: then every second, third … is drawn, still with equal flow between them. */
const mostPaths = 12;

function thin(levels: readonly number[]): number[] {
  const group = Math.ceil(levels.length / mostPaths);
  return levels.filter((_, i) => (i + 1) % group === 0);
}

function toLines({ points, offsets, values }: LevelLines): Lines {
  return { points, offsets, values };
}
