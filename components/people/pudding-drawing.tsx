import Svg, { Line, Path, Text as SvgText } from 'react-native-svg';
import { useTheme } from '../theme/use-theme';

/** The steamed pudding as a measured drawing: outline, flutes, centre line, at-rest line and two dimensions. */
export function PuddingDrawing({ width }: { width: number }) {
  const { colors } = useTheme();
  const mono = "'IBM Plex Mono', monospace";
  return (
    <Svg
      width={width}
      height={(width * 300) / 520}
      viewBox="0 0 520 300"
      role="img"
      aria-label="Measured drawing of a pudding, 150 mm wide and 104 mm high, leaning from where it was at rest"
    >
      <Path
        d="M166 214C160 140 186 82 246 74C264 71 276 80 294 74C352 84 372 146 366 214"
        fill="none"
        stroke={colors.phantom}
        strokeDasharray="14 4 3 4 3 4"
      />
      <Path
        d="M166 214C166 140 208 80 270 72C288 70 300 80 318 76C372 90 376 150 366 214C330 226 202 226 166 214Z"
        fill="none"
        stroke={colors.ink}
        strokeWidth={2}
      />
      {[0, 1, 2, 3, 4].map((k) => (
        <Path
          key={k}
          d={`M${200 + 34 * k} 219C${198 + 36 * k} 160 ${228 + 26 * k} 110 ${266 + 14 * k} 84`}
          fill="none"
          stroke={colors.ink}
          strokeWidth={1}
        />
      ))}
      <Path
        d="M96 222C110 246 420 246 436 222C452 214 420 208 372 208M160 208C112 208 80 214 96 222"
        fill="none"
        stroke={colors.ink}
        strokeWidth={1.5}
      />
      <Line x1={266} x2={266} y1={44} y2={262} stroke={colors.phantom} strokeDasharray="18 4 4 4" />
      <Line x1={404} x2={464} y1={74} y2={74} stroke={colors.edge} />
      <Line x1={404} x2={464} y1={214} y2={214} stroke={colors.edge} />
      <Line x1={452} x2={452} y1={76} y2={212} stroke={colors.ink} />
      <Path d="M452 74l-3.5 10h7zM452 214l-3.5 -10h7z" fill={colors.ink} />
      <SvgText x={460} y={148} fontFamily={mono} fontSize={13} fill={colors.ink}>
        104
      </SvgText>
      <Line x1={166} x2={166} y1={226} y2={276} stroke={colors.edge} />
      <Line x1={366} x2={366} y1={226} y2={276} stroke={colors.edge} />
      <Line x1={168} x2={364} y1={266} y2={266} stroke={colors.ink} />
      <Path d="M166 266l10 -3.5v7zM366 266l-10 -3.5v7z" fill={colors.ink} />
      <SvgText x={246} y={284} fontFamily={mono} fontSize={13} fill={colors.ink}>
        150 mm
      </SvgText>
    </Svg>
  );
}
