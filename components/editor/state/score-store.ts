'use client';
// The state of one open section: the document, its history, what is kept, and the latest answer. Screens read it, nothing else changes it.
import { applyPatches, enablePatches, type Patch, produceWithPatches, type Draft } from 'immer';
import { createStore } from 'zustand/vanilla';
import type { SituationFields } from '@/lib/analysis/fields';
import type { Issue } from '@/lib/domain/issue';
import type { SectionDetail } from '@/lib/domain/dto';
import type { Problem } from '@/lib/domain/problem';
import type { ResultDocument } from '@/lib/domain/result';
import type { SectionDocument } from '@/lib/domain/section';

enablePatches();

/** One undoable step; steps of one group (a drag) are one. */
export interface HistoryEntry {
  readonly label: string;
  readonly group: string | null;
  readonly redo: Patch[];
  readonly undo: Patch[];
}

export type ObjectKind = 'zones' | 'barriers' | 'drains' | 'edges' | 'structures' | 'piezometers';

export interface Selection {
  readonly kind: ObjectKind;
  readonly index: number;
}

export type Keeping =
  | { readonly status: 'kept'; readonly at: string }
  | { readonly status: 'waiting' | 'saving' }
  | { readonly status: 'failed'; readonly message: string }
  | { readonly status: 'conflict'; readonly theirs: SectionDetail };

/** An answer with the document it belongs to. */
export interface Answer {
  readonly document: SectionDocument;
  readonly result: ResultDocument;
  readonly fields: SituationFields[];
  readonly effort: 'live' | 'full';
  /** Milliseconds since the epoch. */
  readonly at: number;
}

export interface Refusal {
  readonly document: SectionDocument;
  readonly problem: Problem;
  readonly issues: Issue[];
}

export interface ScoreState {
  readonly detail: SectionDetail;
  readonly units: 'si' | 'us';
  readonly document: SectionDocument;
  /** Version on the server that the document began from. */
  readonly version: number;
  readonly past: readonly HistoryEntry[];
  readonly future: readonly HistoryEntry[];
  readonly keeping: Keeping;
  readonly situationId: string;
  readonly view: 'drawing' | 'table';
  readonly selection: Selection | null;
  readonly isDragging: boolean;
  readonly answer: Answer | null;
  readonly refusal: Refusal | null;
  /** Changes the document; steps of the same group merge into one entry of the history. */
  edit(label: string, recipe: (draft: Draft<SectionDocument>) => void, group?: string): void;
  undo(): void;
  redo(): void;
  select(selection: Selection | null): void;
  chooseSituation(id: string): void;
  show(view: 'drawing' | 'table'): void;
  setDragging(isDragging: boolean): void;
  setAnswer(answer: Answer): void;
  setRefusal(refusal: Refusal): void;
  setKeeping(keeping: Keeping): void;
  /** The document was kept as this version. */
  markKept(version: number, at: string): void;
  /** Takes a document from elsewhere as the new beginning: theirs in a conflict, a newer one for a reader. */
  adopt(detail: SectionDetail): void;
}

export interface Restored {
  readonly document: SectionDocument;
  readonly past: readonly HistoryEntry[];
  readonly future: readonly HistoryEntry[];
  readonly isChanged: boolean;
}

export type ScoreStore = ReturnType<typeof createScoreStore>;

/** Makes the store of one section, from the server's state and what this browser still holds of it. */
export function createScoreStore(detail: SectionDetail, units: 'si' | 'us', restored: Restored | null) {
  return createStore<ScoreState>((set, get) => ({
    detail,
    units,
    document: restored?.document ?? detail.document,
    version: detail.version,
    past: restored?.past ?? [],
    future: restored?.future ?? [],
    keeping: restored?.isChanged ? { status: 'waiting' } : { status: 'kept', at: detail.updatedAt },
    situationId: detail.document.situations[0]?.id ?? '',
    view: 'drawing',
    selection: null,
    isDragging: false,
    answer: null,
    refusal: null,
    edit(label, recipe, group) {
      if (!get().detail.mayChange) return;
      const [document, redo, undo] = produceWithPatches(get().document, recipe);
      if (redo.length === 0) return;
      set(({ past }) => {
        const last = past.at(-1);
        if (group === undefined || last?.group !== group) {
          const entry = { label, group: group ?? null, redo, undo };
          return { document, past: [...past, entry], future: [], keeping: { status: 'waiting' } };
        }
        const merged = { ...last, redo: [...last.redo, ...redo], undo: [...undo, ...last.undo] };
        return { document, past: [...past.slice(0, -1), merged], future: [], keeping: { status: 'waiting' } };
      });
    },
    undo() {
      const entry = get().past.at(-1);
      if (!entry || !get().detail.mayChange) return;
      set(({ document, past, future }) => ({
        document: applyPatches(document, entry.undo),
        past: past.slice(0, -1),
        future: [...future, entry],
        keeping: { status: 'waiting' },
      }));
    },
    redo() {
      const entry = get().future.at(-1);
      if (!entry || !get().detail.mayChange) return;
      set(({ document, past, future }) => ({
        document: applyPatches(document, entry.redo),
        past: [...past, { ...entry, group: null }],
        future: future.slice(0, -1),
        keeping: { status: 'waiting' },
      }));
    },
    select: (selection) => set({ selection }),
    chooseSituation: (situationId) => set({ situationId }),
    show: (view) => set({ view }),
    setDragging: (isDragging) => set({ isDragging }),
    setAnswer: (answer) => set({ answer, refusal: null }),
    setRefusal: (refusal) => set({ refusal }),
    setKeeping: (keeping) => set({ keeping }),
    markKept: (version, at) =>
      set(({ detail: before }) => ({
        version,
        detail: { ...before, untouched: false },
        keeping: { status: 'kept', at },
      })),
    adopt: (next) =>
      set(({ situationId }) => ({
        detail: next,
        document: next.document,
        version: next.version,
        past: [],
        future: [],
        selection: null,
        situationId: next.document.situations.some(({ id }) => id === situationId)
          ? situationId
          : (next.document.situations[0]?.id ?? ''),
        keeping: { status: 'kept', at: next.updatedAt },
      })),
  }));
}
