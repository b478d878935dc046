import type { SceneDocument } from '../../shared/scene-document';

/** Changes the document; `kind` names the edit so that a run of the same one is a single step of undo. */
export type Edit = (kind: string, change: (document: SceneDocument) => SceneDocument) => void;

/** The first free letter-number name: S1, S2 … */
export function freeId(letter: string, items: readonly { id: string }[]): string {
  for (let n = 1; ; n++) {
    const id = `${letter}${n}`;
    if (!items.some((item) => item.id === id)) return id;
  }
}
