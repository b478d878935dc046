import type { SceneDocument } from '../../shared/scene-document';
import type { Fault } from '../problems/domain-errors';

/** What a document must know about the model it is for. */
export interface DocumentModel {
  id: string;
  patchCount: number;
}

/** Patch numbers named anywhere in the document, each with the pointer to the list it stands in. */
function namedPatches(document: SceneDocument): { pointer: string; patches: number[] }[] {
  const lists = document.materials.flatMap(({ patches }, i) =>
    patches ? [{ pointer: `/materials/${i}/patches`, patches }] : [],
  );
  const regions = [
    ...document.supports.map(({ region }, i) => ({ pointer: `/supports/${i}/region`, region })),
    ...document.loads.flatMap((load, i) =>
      'region' in load ? [{ pointer: `/loads/${i}/region`, region: load.region }] : [],
    ),
  ];
  for (const { pointer, region } of regions) {
    if (region.kind === 'patches') lists.push({ pointer: `${pointer}/patches`, patches: region.patches });
  }
  return lists;
}

/** Faults of a document against its model: the schema cannot know them. Pointers start with `/document`. */
export function faultsAgainstModel(document: SceneDocument, model: DocumentModel): Fault[] {
  const { geometry } = document;
  if (geometry.kind !== 'model') {
    return [{ pointer: '/document/geometry', detail: 'A scene kept here needs a model that was checked in.' }];
  }
  if (geometry.modelId !== model.id) {
    return [
      { pointer: '/document/geometry/modelId', detail: 'A scene keeps its model. Start a new scene for another one.' },
    ];
  }
  return namedPatches(document).flatMap(({ pointer, patches }) => {
    const missing = patches.find((patch) => patch >= model.patchCount);
    if (missing === undefined) return [];
    const last = model.patchCount - 1;
    return [
      {
        pointer: `/document${pointer}`,
        detail: `The model has no patch ${missing}; its patches go from 0 to ${last}.`,
      },
    ];
  });
}
