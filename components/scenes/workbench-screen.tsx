import { useQuery } from '@tanstack/react-query';
import { router } from 'expo-router';
import { useEffect, useMemo, useState } from 'react';
import { Fault } from '../ui/states';
import { useReducedMotion } from '../theme/use-reduced-motion';
import { queries } from '../api/queries';
import { QueryState } from '../ui/query-state';
import { readDraft } from './draft-store';
import { Workbench } from './workbench';

/** Opens a scene: its latest revision, or the draft this browser kept, and the patches of its model. */
export function WorkbenchScreen({ sceneId, firstLook }: { sceneId: string; firstLook: boolean }) {
  const calm = useReducedMotion();
  const [looking] = useState(firstLook);
  // Coming back to the scene, or loading it again, is no first look.
  useEffect(() => {
    if (firstLook) router.setParams({ look: undefined });
  }, [firstLook]);
  const scene = useQuery({ ...queries.scene(sceneId), staleTime: 0 });
  const revision = useQuery({
    ...queries.revision(scene.data?.latestRevision.id ?? ''),
    enabled: scene.data !== undefined,
  });
  const modelId = revision.data?.document.geometry.kind === 'model' ? revision.data.document.geometry.modelId : null;
  const patches = useQuery({ ...queries.patches(modelId ?? ''), enabled: modelId !== null });
  const [draft] = useState(() => readDraft(sceneId));
  const opened = useMemo(
    () => ({ scene: scene.data, revision: revision.data, patches: patches.data }),
    [scene.data, revision.data, patches.data],
  );
  if (revision.isError || patches.isError) {
    return (
      <Fault
        title="This scene could not be opened."
        onRetry={() => void (revision.isError ? revision.refetch() : patches.refetch())}
      >
        {(revision.error ?? patches.error)!.message}
      </Fault>
    );
  }
  return (
    <QueryState query={scene} loading="Fetching the scene …">
      {() =>
        scene.isFetchedAfterMount && opened.scene && opened.revision && opened.patches ? (
          <Workbench
            key={sceneId}
            scene={opened.scene}
            revision={opened.revision}
            patches={opened.patches}
            draft={draft}
            moveAtOnce={looking && !calm}
          />
        ) : null
      }
    </QueryState>
  );
}
