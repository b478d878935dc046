import { useLocalSearchParams } from 'expo-router';
import { WorkbenchScreen } from '../../../components/scenes/workbench-screen';

export default function SceneRoute() {
  const { sceneId } = useLocalSearchParams<{ sceneId: string }>();
  return <WorkbenchScreen key={sceneId} sceneId={sceneId} />;
}
