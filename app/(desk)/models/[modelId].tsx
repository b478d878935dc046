import { useLocalSearchParams } from 'expo-router';
import { ModelScreen } from '../../../components/models/model-screen';

export default function ModelRoute() {
  const { modelId } = useLocalSearchParams<{ modelId: string }>();
  return <ModelScreen key={modelId} modelId={modelId} />;
}
