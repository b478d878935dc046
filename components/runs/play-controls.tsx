import { StyleSheet, View } from 'react-native';
import { Button } from '../ui/button';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { Text } from '../ui/text';
import type { Clock, Pace } from './use-clock';

const PACES: readonly { value: `${Pace}`; label: string }[] = [
  { value: '0.25', label: '¼' },
  { value: '0.5', label: '½' },
  { value: '1', label: '1' },
  { value: '2', label: '2' },
];

/** Step, play and speed; on a phone four buttons across, the speed going round by taps. */
export function PlayControls({ clock, spread = false }: { clock: Clock; spread?: boolean }) {
  const style = spread ? styles.even : undefined;
  const now = PACES.findIndex((pace) => Number(pace.value) === clock.pace);
  const next = PACES[(now + 1) % PACES.length]!;
  return (
    <View style={styles.row}>
      <Button label="−1 frame" tight={spread} onPress={() => clock.step(-1)} style={style} />
      <Button label={clock.playing ? 'Pause' : 'Play'} kind="primary" onPress={clock.toggle} style={style} />
      <Button label="+1 frame" tight={spread} onPress={() => clock.step(1)} style={style} />
      {spread ? (
        <Button
          label={`Speed ${PACES[now]!.label}`}
          hint={`Goes to ${next.label} times the speed`}
          tight
          onPress={() => clock.setPace(Number(next.value) as Pace)}
          style={style}
        />
      ) : (
        <View style={styles.speed}>
          <ChoiceOfFew
            label="Speed of playing"
            value={`${clock.pace}`}
            options={PACES}
            onChange={(pace) => clock.setPace(Number(pace) as Pace)}
          />
          <Text variant="note" color="ink2">
            speed
          </Text>
        </View>
      )}
    </View>
  );
}

const styles = StyleSheet.create({
  row: { flexDirection: 'row', gap: 8 },
  even: { flex: 1 },
  speed: { flexDirection: 'row', alignItems: 'center', gap: 8, marginLeft: 8 },
});
