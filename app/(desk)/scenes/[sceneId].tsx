import { useLocalSearchParams } from 'expo-router';
import { WorkbenchScreen } from '../../../components/scenes/workbench-screen';

export default function SceneRoute() {
  const { sceneId, look } = useLocalSearchParams<{ sceneId: string; look?: string }>();
  return <WorkbenchScreen key={sceneId} sceneId={sceneId} firstLook={look === 'first'} />;
}
