import type { SceneDocument } from '../../shared/scene-document';

/** The patches picked for a support or load. */
export function pickedPatches(document: SceneDocument, id: string | null): ReadonlySet<number> {
  const item = [...document.supports, ...document.loads].find((each) => each.id === id);
  return new Set(item && 'region' in item && item.region.kind === 'patches' ? item.region.patches : []);
}

/** Adds a patch to the region of a support or load, or takes it out; a region of another kind becomes patches. */
export function togglePatch(document: SceneDocument, id: string, patch: number): SceneDocument {
  const toggle = <T extends { id: string }>(item: T): T => {
    if (item.id !== id || !('region' in item)) return item;
    const region = item.region as SceneDocument['supports'][number]['region'];
    const now = region.kind === 'patches' ? region.patches : [];
    const patches = now.includes(patch) ? now.filter((p) => p !== patch) : [...now, patch].sort((a, b) => a - b);
    return patches.length === 0 ? item : { ...item, region: { kind: 'patches', patches } };
  };
  return { ...document, supports: document.supports.map(toggle), loads: document.loads.map(toggle) };
}
