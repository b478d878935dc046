import { sceneDocumentSchema, type SceneDocument } from '../../shared/scene-document';

/** Unsaved edits of a scene, kept in this browser until they are saved as a revision. */
const keyOf = (sceneId: string) => `lollop.draft.${sceneId}`;

export interface Draft {
  basedOn: number;
  document: SceneDocument;
}

export function readDraft(sceneId: string): Draft | null {
  try {
    const raw = JSON.parse(localStorage.getItem(keyOf(sceneId)) ?? 'null') as {
      basedOn?: unknown;
      document?: unknown;
    } | null;
    const parsed = sceneDocumentSchema.safeParse(raw?.document);
    return parsed.success && typeof raw?.basedOn === 'number' ? { basedOn: raw.basedOn, document: parsed.data } : null;
  } catch {
    return null;
  }
}

export function keepDraft(sceneId: string, draft: Draft | null): void {
  try {
    if (draft) localStorage.setItem(keyOf(sceneId), JSON.stringify(draft));
    else localStorage.removeItem(keyOf(sceneId));
  } catch {
    // A full or closed storage must not stop the work; the draft then lives as long as the page.
  }
}
