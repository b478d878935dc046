import { useLocalSearchParams } from 'expo-router';
import { RunPlayerScreen } from '../../../components/runs/run-player-screen';

export default function RunRoute() {
  const { runId } = useLocalSearchParams<{ runId: string }>();
  return <RunPlayerScreen key={runId} runId={runId} />;
}
