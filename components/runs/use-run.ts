import { useQuery } from '@tanstack/react-query';
import { useEffect, useMemo, useState } from 'react';
import { api } from '../api/client';
import { queries } from '../api/queries';
import { PoseSource } from '../stage/pose-source';
import { RunPoses, runSurface } from './run-store';

/** Everything a player needs of one run; poses arrive by and by. */
export function useRun(runId: string) {
  const run = useQuery(queries.run(runId));
  const revision = useQuery({ ...queries.revision(run.data?.revision.id ?? ''), enabled: run.data !== undefined });
  const patches = useQuery({ ...queries.patches(run.data?.model.id ?? ''), enabled: run.data !== undefined });
  const traces = useQuery({ ...queries.traces(runId), enabled: run.data?.status === 'complete' });
  const surface = useQuery({
    queryKey: ['surface', runId],
    staleTime: Infinity,
    gcTime: 60_000,
    enabled: run.data !== undefined && patches.data !== undefined && revision.data !== undefined,
    queryFn: () => runSurface(api, run.data!, patches.data!, revision.data!.document.unit),
  });
  const [source] = useState(() => new PoseSource());
  const [arrived, setArrived] = useState(0);
  const poses = useMemo(() => (run.data ? new RunPoses(api, run.data) : null), [run.data]);
  useEffect(() => {
    if (!poses) return;
    const end = poses.subscribe(() => setArrived(poses.arrived));
    void poses.load();
    return () => {
      end();
      poses.stop();
    };
  }, [poses]);
  return {
    run: run.data ?? null,
    document: revision.data?.document ?? null,
    traces: traces.data ?? null,
    surface: surface.data ?? null,
    poses,
    arrived,
    source,
    fault: (run.error ?? revision.error ?? patches.error ?? surface.error)?.message ?? poses?.fault ?? null,
  };
}

export type OpenRun = ReturnType<typeof useRun>;
