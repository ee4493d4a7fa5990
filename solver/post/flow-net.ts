// The flow net in numbers: equal drops of head, equal channels of flow, the last channel fractional.
import type { Mesh } from '../mesh/mesh';
import type { Conductivity, SectionGeometry } from '../problem';

/** Drops of a flow net where nothing else is asked: drawing practice uses 10 to 20. */
export const defaultDrops = 12;

/** What the net is drawn from. */
export interface FlowNetInput {
  readonly mesh: Mesh;
  readonly kind: SectionGeometry['kind'];
  /** One a material. */
  readonly conductivities: readonly Conductivity[];
  /** Through the section, m³/s per metre run, or m³/s over the full circle. */
  readonly discharge: number;
  /** Lowest and highest prescribed head, metres. */
  readonly headRange: readonly [number, number];
  /** Equal drops; default {@link defaultDrops}. */
  readonly drops?: number;
}

/** Numbers of a flow net. */
export interface FlowNet {
  readonly drops: number;
  /** Number of flow channels, not a whole number: the last one is a part. */
  readonly channels: number;
  /** q / (k ΔH); in an axisymmetric section in metres, for the full circle. */
  readonly shapeFactor: number;
  /** √(kMajor kMinor) of the reference material, m/s. */
  readonly referencePermeability: number;
  /** Material with the largest area of ground, index. */
  readonly referenceMaterial: number;
  /** Heads between the drops, ascending, without the two ends; metres. */
  readonly headLevels: number[];
  /** Stream function between the channels, ascending, without 0 and the discharge; in the unit of the discharge. */
  readonly streamLevels: number[];
}

/**
 * Counts drops and channels of a flow net.
 *
 * On a plane section q = k ΔH Nf / Nd with k = √(kMajor kMinor): Nf = Nd q / (k ΔH) makes the fields of the reference material
 * square in its transformed section. In an axisymmetric section no net is square everywhere; there the channels are counted at the
 * ground's mean radius, which is a choice for the drawing only.
 *
 * @param input - Mesh, materials, discharge and heads.
 * @returns The net; no levels where there is no flow.
 * @source Forchheimer's flow net as in A. Casagrande (1937), Seepage through dams; Cedergren (1989), Seepage, Drainage and Flow
 *   Nets, ch. 4 (both from memory).
 */
export function flowNet({
  mesh,
  kind,
  conductivities,
  discharge,
  headRange,
  drops = defaultDrops,
}: FlowNetInput): FlowNet {
  const { material, radius } = surveyGround(mesh, conductivities.length);
  const { kMajor, kMinor } = conductivities[material];
  const referencePermeability = Math.sqrt(kMajor * kMinor);
  const [low, high] = headRange;
  const loss = high - low;
  const flows = loss > 0 && discharge > 0;
  const shapeFactor = flows ? discharge / (referencePermeability * loss) : 0;
  const channels = (drops * shapeFactor) / (kind === 'plane' ? 1 : 2 * Math.PI * radius);
  const headLevels = flows ? Array.from({ length: drops - 1 }, (_, i) => low + ((i + 1) * loss) / drops) : [];
  const lines = Math.min(Math.ceil(channels) - 1, mostChannels - 1);
  const step = discharge / Math.min(channels, mostChannels);
  const streamLevels = flows ? Array.from({ length: Math.max(0, lines) }, (_, i) => (i + 1) * step) : [];
  return {
    drops,
    channels,
    shapeFactor,
    referencePermeability,
    referenceMaterial: material,
    headLevels,
    streamLevels,
  };
}

/** More would fill the drawing, where the reference material is far tighter than what conducts: then wider equal channels are drawn. */
const mostChannels = 60;

function surveyGround(mesh: Mesh, materialCount: number): { material: number; radius: number } {
  const { coordinates, elements } = mesh;
  const stride = mesh.order === 1 ? 3 : 6;
  const areas = new Float64Array(materialCount);
  let [total, moment] = [0, 0];
  for (let e = 0; e < mesh.elementCount; e++) {
    const [a, b, c] = [0, 1, 2].map((k) => 2 * elements[stride * e + k]);
    const [ux, uy] = [coordinates[b] - coordinates[a], coordinates[b + 1] - coordinates[a + 1]];
    const [vx, vy] = [coordinates[c] - coordinates[a], coordinates[c + 1] - coordinates[a + 1]];
    const area = (ux * vy - uy * vx) / 2;
    areas[mesh.elementMaterials[e]] += area;
    total += area;
    moment += (area * (coordinates[a] + coordinates[b] + coordinates[c])) / 3;
  }
  return { material: areas.indexOf(Math.max(...areas)), radius: moment / total };
}
