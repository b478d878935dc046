import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { useState } from 'react';
import { View } from 'react-native';
import Svg, { Circle, Line, Path, Rect, Text as SvgText } from 'react-native-svg';
import { fittedStress, type MaterialFit, type TestPoint } from '../../shared/material-fit';
import { figures } from '../../shared/units';
import { useTheme } from '../theme/use-theme';

const LEFT = 46;
const RIGHT = 8;
const TOP = 8;
const FOOT = 30;
const MONO = "'IBM Plex Mono', monospace";
const SANS = "'IBM Plex Sans', sans-serif";

/**
 * Measured stress as dots (hollow beyond the range used) under the fitted law as a line, or with `residuals` what the
 * law leaves over. Stress in MPa against stretch.
 */
export function FitPlot({
  points,
  fit,
  residuals = false,
  height,
}: {
  points: readonly TestPoint[];
  fit: MaterialFit;
  residuals?: boolean;
  height: number;
}) {
  const { colors } = useTheme();
  const [width, setWidth] = useState(0);
  const mega = (p: TestPoint) => (residuals ? p.stress - fittedStress(fit, p.kind, p.stretch) : p.stress) / 1e6;
  const shown = residuals ? points.filter(({ stretch }) => stretch <= fit.upTo) : points;
  const values = shown.map(mega);
  const x = scaleLinear(
    [1, Math.max(...points.map(({ stretch }) => stretch))],
    [LEFT, Math.max(LEFT + 1, width - RIGHT)],
  );
  const y = scaleLinear([Math.min(0, ...values), Math.max(0, ...values)], [height - FOOT, TOP]).nice(3);
  const kinds = [...new Set(points.map(({ kind }) => kind))];
  const steps = Array.from({ length: 60 }, (_, k) => 1 + ((x.domain()[1]! - 1) * k) / 59);
  const title = residuals ? 'measured less fitted, MPa' : 'nominal stress, MPa';
  return (
    <View
      role="img"
      aria-label={`${title} against stretch, ${shown.length} points`}
      style={{ height }}
      onLayout={(event) => setWidth(event.nativeEvent.layout.width)}
    >
      {width > 0 ? (
        <Svg width={width} height={height}>
          {residuals ? null : (
            <Rect
              x={LEFT}
              y={TOP}
              width={Math.max(0, x(Math.min(fit.upTo, x.domain()[1]!)) - LEFT)}
              height={height - FOOT - TOP}
              fill={colors.kelpWash}
            />
          )}
          {y.ticks(3).map((tick) => (
            <Line
              key={tick}
              x1={LEFT}
              x2={width - RIGHT}
              y1={y(tick)}
              y2={y(tick)}
              stroke={tick === 0 ? colors.edge : colors.hair}
            />
          ))}
          {y.ticks(3).map((tick) => (
            <SvgText
              key={tick}
              x={LEFT - 6}
              y={y(tick) + 4}
              textAnchor="end"
              fontFamily={MONO}
              fontSize={12}
              fill={colors.ink2}
            >
              {figures(tick)}
            </SvgText>
          ))}
          {x.ticks(4).map((tick) => (
            <SvgText
              key={tick}
              x={x(tick)}
              y={height - FOOT + 16}
              textAnchor="middle"
              fontFamily={MONO}
              fontSize={12}
              fill={colors.ink2}
            >
              {figures(tick)}
            </SvgText>
          ))}
          {residuals
            ? null
            : kinds.map((kind) => (
                <Path
                  key={kind}
                  d={
                    line<number>(
                      (l) => x(l),
                      (l) => Math.max(-1e3, Math.min(1e3, y(fittedStress(fit, kind, l) / 1e6))),
                    )(steps) ?? ''
                  }
                  fill="none"
                  stroke={colors.kelp}
                  strokeWidth={2}
                />
              ))}
          {shown.map((point, k) => (
            <Circle
              key={k}
              cx={x(point.stretch)}
              cy={y(mega(point))}
              r={3.5}
              fill={point.stretch <= fit.upTo ? colors.ink : colors.page}
              stroke={colors.ink}
            />
          ))}
          <SvgText x={width - RIGHT} y={height - 2} textAnchor="end" fontFamily={SANS} fontSize={12} fill={colors.ink2}>
            stretch
          </SvgText>
        </Svg>
      ) : null}
    </View>
  );
}
