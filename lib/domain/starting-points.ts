// Five complete sections to begin from. Every number is invented; each is solved as it stands and yours to replace.
import { type SectionDocument, type SectionInput, sectionSchema } from './section';
import { apronWithCutoffs } from './starting-points/apron-with-cutoffs';
import { leveeWithBlanket } from './starting-points/levee-with-blanket';
import { pitBetweenWalls } from './starting-points/pit-between-walls';
import { wallInGround } from './starting-points/wall-in-ground';
import { zonedEmbankment } from './starting-points/zoned-embankment';

/** A section to begin from. */
export interface StartingPoint {
  readonly id: string;
  readonly title: string;
  readonly summary: string;
  readonly document: SectionDocument;
}

function make(id: string, summary: string, input: SectionInput): StartingPoint {
  return { id, title: input.title, summary, document: sectionSchema.parse(input) };
}

/** The starting points, in the order they are offered. */
export const startingPoints: readonly StartingPoint[] = [
  make('wall-in-ground', 'A sheet pile in layered ground under two water levels.', wallInGround),
  make(
    'apron-with-cutoffs',
    'A stilling basin with a cutoff at each end, on anisotropic alluvium with a lens.',
    apronWithCutoffs,
  ),
  make('levee-with-blanket', 'A river levee on a tight blanket over a sand aquifer.', leveeWithBlanket),
  make('pit-between-walls', 'A pumped-out pit between two walls, with water on both sides.', pitBetweenWalls),
  make(
    'zoned-embankment',
    'The foundation of a zoned embankment: core trench, slurry wall, alluvium over weathered rock. The dam itself is taken as its base; flow through it needs a free surface, which is not solved yet.',
    zonedEmbankment,
  ),
];
