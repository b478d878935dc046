import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { space } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Text } from './text';

interface Props {
  name: string;
  /** a quantity, in Mono */
  value?: string;
  /** words instead of a quantity */
  words?: string;
  note?: string;
  action?: ReactNode;
}

/** One dense line of a report: its name, and what was found. */
export function Fact({ name, value, words, note, action }: Props) {
  const { colors } = useTheme();
  return (
    <View style={[styles.fact, { borderBottomColor: colors.hair }]}>
      <View style={styles.line}>
        <Text variant="dense" style={styles.name}>
          {name}
        </Text>
        {value ? <Text variant="quantity">{value}</Text> : null}
        {words ? (
          <Text variant="dense" style={styles.words}>
            {words}
          </Text>
        ) : null}
        {action}
      </View>
      {note ? (
        <Text variant="note" color="ink2">
          {note}
        </Text>
      ) : null}
    </View>
  );
}

const styles = StyleSheet.create({
  fact: { minHeight: 40, justifyContent: 'center', paddingVertical: space.s, borderBottomWidth: 1 },
  line: { flexDirection: 'row', alignItems: 'baseline', gap: space.m },
  name: { flexGrow: 1, flexShrink: 1 },
  words: { flexShrink: 1, textAlign: 'right' },
});
