import type { ViewStyle } from 'react-native';

/** Two pixels of ink with two pixels of air, around whatever has the focus. */
export const focusRing = (ink: string): ViewStyle => ({
  outlineColor: ink,
  outlineStyle: 'solid',
  outlineWidth: 2,
  outlineOffset: 2,
});
