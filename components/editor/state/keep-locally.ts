// What this browser holds of a section: the document as last seen here and its history, so that nothing typed is lost to a reload,
// a closed lid or a server that went away.
import type { SectionDetail } from '@/lib/domain/dto';
import type { SectionDocument } from '@/lib/domain/section';
import type { HistoryEntry, Restored } from './score-store';

interface Kept {
  readonly version: number;
  readonly document: SectionDocument;
  readonly past: readonly HistoryEntry[];
  readonly future: readonly HistoryEntry[];
  /** The document differs from what the server had as this version. */
  readonly isChanged: boolean;
}

/** Entries of the history that are kept across reloads; older ones go first when the browser's space runs out. */
const mostEntries = 500;

function keyOf(sectionId: string): string {
  return `underfall.section.${sectionId}`;
}

/** Writes the state down; with less history where the browser refuses the size. */
export function keepLocally(sectionId: string, kept: Kept): void {
  for (const entries of [mostEntries, 50, 0]) {
    try {
      const past = entries === 0 ? [] : kept.past.slice(-entries);
      localStorage.setItem(
        keyOf(sectionId),
        JSON.stringify({ ...kept, past, future: entries === 0 ? [] : kept.future }),
      );
      return;
    } catch {
      // out of space or not permitted: the next round keeps less
    }
  }
}

/** What to begin from: local changes on the server's version, a conflict where the server went on, or nothing. */
export function restoreLocally(detail: SectionDetail): { restored: Restored | null; isBehind: boolean } {
  const kept = readKept(detail.id);
  if (!kept) return { restored: null, isBehind: false };
  if (kept.isChanged) return { restored: kept, isBehind: kept.version !== detail.version };
  // history belongs to the very document it was made on
  if (kept.version !== detail.version) return { restored: null, isBehind: false };
  return { restored: { ...kept, document: detail.document, isChanged: false }, isBehind: false };
}

function readKept(sectionId: string): Kept | null {
  try {
    const text = localStorage.getItem(keyOf(sectionId));
    return text ? (JSON.parse(text) as Kept) : null;
  } catch {
    return null;
  }
}
