import type { Mesh } from '../mesh/mesh';
import type { Conductivity, SectionGeometry, SituationConditions } from '../problem';

/** A section with the heads of one situation. */
export interface SolvedSection {
  readonly mesh: Mesh;
  readonly kind: SectionGeometry['kind'];
  /** One a material. */
  readonly conductivities: readonly Conductivity[];
  /** One for each edge and drain of the mesh. */
  readonly conditions: SituationConditions;
  /** Total head per node, metres. */
  readonly heads: Float64Array;
  /** Nodal flow per node, positive into the ground: consistent with `heads`, loads of flux edges taken off. */
  readonly reactions: Float64Array;
}
