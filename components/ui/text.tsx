import type { ReactNode } from 'react';
import { Text as NativeText, type StyleProp, type TextProps, type TextStyle } from 'react-native';
import type { Palette } from '../theme/palette';
import { type as variants, type TextVariant } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';

interface Props extends Pick<
  TextProps,
  'numberOfLines' | 'nativeID' | 'role' | 'aria-live' | 'aria-hidden' | 'selectable'
> {
  variant?: TextVariant;
  color?: keyof Palette;
  level?: 1 | 2 | 3;
  style?: StyleProp<TextStyle>;
  children: ReactNode;
}

/** Lettering in one of the theme's variants; `level` makes it a heading. */
export function Text({ variant = 'body', color = 'ink', level, style, ...rest }: Props) {
  const { colors } = useTheme();
  const heading = level ? { role: 'heading' as const, 'aria-level': level } : {};
  return <NativeText {...heading} {...rest} style={[variants[variant], { color: colors[color] }, style]} />;
}
