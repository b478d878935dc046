import { StyleSheet, View } from 'react-native';
import { RADIUS, space } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Text } from './text';

/** A kind or a state in words, in a line of its colour. */
export function Tag({ label, color }: { label: string; color: 'kelp' | 'apricot' | 'plum' | 'ink2' }) {
  const { colors } = useTheme();
  return (
    <View style={[styles.tag, { borderColor: colors[color], backgroundColor: colors.page }]}>
      <Text variant="caption" color={color} style={styles.word}>
        {label}
      </Text>
    </View>
  );
}

const styles = StyleSheet.create({
  tag: {
    borderWidth: 1,
    borderRadius: RADIUS,
    paddingHorizontal: space.s - 2,
    paddingVertical: 1,
  },
  word: { fontWeight: '500' },
});
