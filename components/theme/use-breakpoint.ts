import { useWindowDimensions } from 'react-native';

/** phone 360–599, tablet 600–899 (the phone's shell), wide from 900, large from 1600. */
export function useBreakpoint(): { wide: boolean; large: boolean; phone: boolean; width: number; height: number } {
  const { width, height } = useWindowDimensions();
  return { phone: width < 600, wide: width >= 900, large: width >= 1600, width, height };
}
