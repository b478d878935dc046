import { useLocalSearchParams } from 'expo-router';
import { SideBySideScreen } from '../../../components/side-by-side/side-by-side-screen';

export default function SideBySideRoute() {
  const { left, right } = useLocalSearchParams<{ left: string; right: string }>();
  return <SideBySideScreen key={`${left}:${right}`} left={left} right={right} />;
}
