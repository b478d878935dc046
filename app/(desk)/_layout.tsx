import { Slot } from 'expo-router';
import { DeskShell } from '../../components/shell/desk-shell';

export default function DeskLayout() {
  return (
    <DeskShell>
      <Slot />
    </DeskShell>
  );
}
