import { useCallback, useState } from 'react';
import type { SceneDocument } from '../../shared/scene-document';

interface History {
  past: SceneDocument[];
  now: SceneDocument;
  future: SceneDocument[];
}

/** Edits of the same kind that follow within this time are one step of undo, so that a dragged slider is. */
const SAME_EDIT_MILLISECONDS = 800;

/** The edited document with undo and redo. */
export function useHistory(start: SceneDocument) {
  const [history, setHistory] = useState<History & { kind: string; at: number }>({
    past: [],
    now: start,
    future: [],
    kind: '',
    at: 0,
  });
  const edit = useCallback((kind: string, change: (document: SceneDocument) => SceneDocument) => {
    setHistory((h) => {
      const at = Date.now();
      const now = change(h.now);
      if (now === h.now) return h;
      const goesOn = kind === h.kind && at - h.at < SAME_EDIT_MILLISECONDS;
      return { past: goesOn ? h.past : [...h.past.slice(-199), h.now], now, future: [], kind, at };
    });
  }, []);
  const undo = useCallback(
    () =>
      setHistory((h) => {
        const before = h.past[h.past.length - 1];
        return before ? { past: h.past.slice(0, -1), now: before, future: [h.now, ...h.future], kind: '', at: 0 } : h;
      }),
    [],
  );
  const redo = useCallback(
    () =>
      setHistory((h) => {
        const [next, ...rest] = h.future;
        return next ? { past: [...h.past, h.now], now: next, future: rest, kind: '', at: 0 } : h;
      }),
    [],
  );
  return {
    document: history.now,
    edit,
    undo,
    redo,
    canUndo: history.past.length > 0,
    canRedo: history.future.length > 0,
  };
}
