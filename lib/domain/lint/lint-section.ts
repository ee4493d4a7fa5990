import type { Issue } from '../issue';
import type { SectionDocument } from '../section';
import { lintMaterials } from './materials';
import { lintSideBoundaries } from './side-boundaries';

/**
 * Looks for common slips in a section that is sound: never a stop, always a question or a remark.
 *
 * @param document - Without stops.
 * @returns The findings.
 */
export function lintSection(document: SectionDocument): Issue[] {
  return [...lintMaterials(document), ...lintSideBoundaries(document)];
}
