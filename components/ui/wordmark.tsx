import Svg, { Path } from 'react-native-svg';
import { useTheme } from '../theme/use-theme';

const STROKES = [
  'M8 8V38C8 44.5 10.5 47.5 16 47.5C25 47.5 27 55 38.5 55C50 55 52 47.5 60.5 47.5',
  'M38.5 23.5C46.3 23.5 51 27.8 51 33.6C51 39.8 46 44 38.5 44C31 44 26 39.8 26 33.6C26 27.8 30.7 23.5 38.5 23.5Z',
  'M66 7.5L70.4 39.5',
  'M82 4.4L84 35',
  'M107 9.6C113.8 9.4 117.7 14 117.9 20.8C118.1 27.8 114.4 32.8 107.8 33C101 33.2 97 28.6 96.8 21.6C96.6 14.6 100.4 9.8 107 9.6Z',
  'M133 19.4L126 59',
  'M131.8 25C134.8 20.6 139.6 18.6 144.8 19.5C151.6 20.7 155.2 26.2 154 32.6C152.8 39.2 147.4 43 140.6 41.8C135.8 41 132 38 130.4 33.6',
];

export function Wordmark({ width = 74 }: { width?: number }) {
  const { colors } = useTheme();
  return (
    <Svg width={width} height={(width * 64) / 168} viewBox="0 0 168 64" role="img" aria-label="Lollop">
      {STROKES.map((d) => (
        <Path
          key={d}
          d={d}
          stroke={colors.ink}
          strokeWidth={5}
          strokeLinecap="round"
          strokeLinejoin="round"
          fill="none"
        />
      ))}
    </Svg>
  );
}
