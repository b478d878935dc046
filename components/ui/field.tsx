import { useId, useState } from 'react';
import { StyleSheet, TextInput, View, type KeyboardTypeOptions, type TextInputProps } from 'react-native';
import { RADIUS, space, type as variants } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Button } from './button';
import { focusRing } from './focus-ring';
import { Text } from './text';

interface Props {
  label: string;
  value: string;
  onChangeText: (value: string) => void;
  onBlur?: () => void;
  onSubmit?: () => void;
  unit?: string;
  error?: string | null;
  note?: string;
  secret?: boolean;
  multiline?: boolean;
  keyboard?: KeyboardTypeOptions;
  autoComplete?: TextInputProps['autoComplete'];
  placeholder?: string;
}

/** A labelled field; the unit stands inside it, what is wrong with it below. */
export function Field(props: Props) {
  const {
    label,
    value,
    onChangeText,
    onBlur,
    onSubmit,
    unit,
    error,
    note,
    secret,
    multiline,
    keyboard,
    autoComplete,
    placeholder,
  } = props;
  const { colors } = useTheme();
  const [focused, setFocused] = useState(false);
  const [shown, setShown] = useState(false);
  const id = useId();
  return (
    <View style={[styles.field, multiline && styles.whole]}>
      <Text variant="strong" nativeID={id}>
        {label}
      </Text>
      <View
        style={[
          styles.box,
          { backgroundColor: colors.paper, borderColor: error ? colors.apricot : colors.edge },
          focused && focusRing(colors.ink),
        ]}
      >
        <TextInput
          aria-label={unit ? `${label}, ${unit}` : label}
          aria-invalid={Boolean(error)}
          value={value}
          onChangeText={onChangeText}
          onFocus={() => setFocused(true)}
          onBlur={() => {
            setFocused(false);
            onBlur?.();
          }}
          onSubmitEditing={onSubmit}
          secureTextEntry={secret && !shown}
          multiline={multiline}
          numberOfLines={multiline ? 4 : undefined}
          keyboardType={keyboard}
          autoComplete={autoComplete}
          autoCapitalize="none"
          placeholder={placeholder}
          placeholderTextColor={colors.ink2}
          style={[variants.field, styles.input, multiline && styles.tall, { color: colors.ink }]}
        />
        {unit ? (
          <Text variant="quantity" color="ink2" style={styles.unit}>
            {unit}
          </Text>
        ) : null}
        {secret ? <Button kind="quiet" label={shown ? 'Hide' : 'Show'} onPress={() => setShown(!shown)} /> : null}
      </View>
      {error ? (
        <Text variant="note" color="apricot" role="alert">
          {error}
        </Text>
      ) : note ? (
        <Text variant="note" color="ink2">
          {note}
        </Text>
      ) : null}
    </View>
  );
}

const styles = StyleSheet.create({
  field: { gap: space.xs, flex: 1 },
  box: {
    minHeight: 48,
    borderWidth: 1,
    borderRadius: RADIUS,
    flexDirection: 'row',
    alignItems: 'center',
  },
  unit: { paddingRight: space.m },
  input: { flex: 1, minWidth: 0, minHeight: 46, paddingHorizontal: space.m, outlineWidth: 0 },
  tall: { minHeight: 112, paddingVertical: space.m },
  // A tall field keeps its height in a column.
  whole: { flexBasis: 'auto', flexShrink: 0 },
});
