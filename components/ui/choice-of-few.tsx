import { Pressable, StyleSheet, View } from 'react-native';
import { RADIUS, space, TARGET } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Text } from './text';

interface Props<T extends string> {
  label: string;
  options: readonly { value: T; label: string }[];
  value: T;
  onChange: (value: T) => void;
}

/** One of up to four words; the chosen one is heavier and stands on a kelp foot. */
export function ChoiceOfFew<T extends string>({ label, options, value, onChange }: Props<T>) {
  const { colors } = useTheme();
  return (
    <View
      role="radiogroup"
      aria-label={label}
      style={[styles.row, { borderColor: colors.edge, backgroundColor: colors.paper }]}
    >
      {options.map((option, k) => {
        const chosen = option.value === value;
        return (
          <Pressable
            key={option.value}
            role="radio"
            aria-checked={chosen}
            aria-label={option.label}
            onPress={() => onChange(option.value)}
            style={[
              styles.option,
              k > 0 && { borderLeftWidth: 1, borderLeftColor: colors.hair },
              { borderBottomColor: chosen ? colors.kelp : 'transparent' },
            ]}
          >
            <Text variant={chosen ? 'button' : 'dense'} color={chosen ? 'ink' : 'ink2'} numberOfLines={1}>
              {option.label}
            </Text>
          </Pressable>
        );
      })}
    </View>
  );
}

const styles = StyleSheet.create({
  row: { flexDirection: 'row', borderWidth: 1, borderRadius: RADIUS, alignSelf: 'flex-start', maxWidth: '100%' },
  option: { minHeight: TARGET - 2, paddingHorizontal: space.m, justifyContent: 'center', borderBottomWidth: 3 },
});
