import type { Issue } from '@/lib/domain/issue';
import type { SectionDocument } from '@/lib/domain/section';
import {
  buildMesh,
  type Medium,
  type Mesh,
  prepareSteady,
  type SectionGeometry,
  type SteadyModel,
} from '@/solver';
import { buildGeometry } from './build-problem';
import { noteOf } from './mesh-notes';

/** A mesh with its prepared model and the mesher's remarks in words. */
export interface MeshedSection {
  readonly status: 'meshed';
  readonly mesh: Mesh;
  readonly model: SteadyModel;
  readonly notes: Issue[];
}

/** Keeps the meshes of the latest geometry, their analysis, and the latest medium with its factor. */
export class AnalysisMemory {
  private geometryKey = '';
  private mediumKey = '';
  private latestMedium: Medium | null = null;
  private readonly meshes = new Map<number, MeshedSection | { status: 'refused'; notes: Issue[] }>();

  /** The mesh of a section at a size factor, made once per geometry. */
  mesh(
    document: SectionDocument,
    size: number,
    maxElements: number,
  ): MeshedSection | { status: 'refused'; notes: Issue[] } {
    const geometry = buildGeometry(document);
    this.keep(geometry);
    const known = this.meshes.get(size);
    if (known) return known;
    const outcome = buildMesh(geometry, { order: 2, sizeFactor: size, maxElements });
    const notes = outcome.findings.map((finding) => noteOf(document, finding));
    const made =
      outcome.status === 'refused'
        ? { status: outcome.status, notes }
        : {
            status: outcome.status,
            mesh: outcome.mesh,
            model: prepareSteady(outcome.mesh, geometry.kind),
            notes,
          };
    this.meshes.set(size, made);
    return made;
  }

  /** Whether the mesh of a size factor was cut short by the element limit: a finer one would be the same. */
  isAtLimit(size: number): boolean {
    return this.meshes.get(size)?.notes.some((note) => note.code === 'element-limit') ?? false;
  }

  /** The same object for the same permeabilities, by which the solver knows that its factor still holds. */
  medium(medium: Medium): Medium {
    const key = JSON.stringify(medium);
    if (key !== this.mediumKey || !this.latestMedium) {
      this.mediumKey = key;
      this.latestMedium = medium;
    }
    return this.latestMedium;
  }

  private keep(geometry: SectionGeometry): void {
    // a barrier's conductance is a matter of the medium, but whether it leaks decides what the mesh remarks on pieces
    const key = JSON.stringify({
      ...geometry,
      barriers: geometry.barriers.map(({ path, conductance }) => [path, conductance > 0]),
    });
    if (key === this.geometryKey) return;
    this.geometryKey = key;
    this.meshes.clear();
  }
}
