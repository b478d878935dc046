import { useLocalSearchParams } from 'expo-router';
import { RunsScreen } from '../../../components/runs/runs-screen';

export default function RunsRoute() {
  const { left } = useLocalSearchParams<{ left?: string }>();
  return <RunsScreen key={left} chosen={left} />;
}
