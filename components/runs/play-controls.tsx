import { StyleSheet, View } from 'react-native';
import { Button } from '../ui/button';
import type { Clock, Pace } from './use-clock';

const NEXT: Record<Pace, Pace> = { 1: 0.5, 0.5: 0.25, 0.25: 1 };
const WORDS: Record<Pace, string> = { 1: 'Full speed', 0.5: '½ speed', 0.25: '¼ speed' };

export function PlayControls({ clock, spread = false }: { clock: Clock; spread?: boolean }) {
  const style = spread ? styles.wide : undefined;
  return (
    <View style={styles.row}>
      <Button label="−1 frame" onPress={() => clock.step(-1)} style={style} />
      <Button label={clock.playing ? 'Pause' : 'Play'} kind="primary" onPress={clock.toggle} style={style} />
      <Button label="+1 frame" onPress={() => clock.step(1)} style={style} />
      <Button
        label={WORDS[clock.pace]}
        hint="Change the speed of playing"
        onPress={() => clock.setPace(NEXT[clock.pace])}
        style={style}
      />
    </View>
  );
}

const styles = StyleSheet.create({ row: { flexDirection: 'row', gap: 8, flexWrap: 'wrap' }, wide: { flexGrow: 1 } });
