import { useState } from 'react';
import { StyleSheet, View } from 'react-native';
import Svg, { G, Line, Path, Text as SvgText } from 'react-native-svg';
import { stressText } from '../../shared/units';
import type { MaterialPreset } from '../../shared/wire/materials';
import { useTheme } from '../theme/use-theme';
import { markerOf, type Marker } from './families';

const LEFT = 74;
const RIGHT = 14;
const TOP = 24;
const FOOT = 44;
const REACH = 32;
const DENSITIES = [20, 50, 100, 200, 500, 1000, 2000, 10_000];
const MONO = "'IBM Plex Mono', monospace";
const SANS = "'IBM Plex Sans', sans-serif";

const MARKERS: Record<Marker, string> = {
  circle: 'M-4.5 0a4.5 4.5 0 1 0 9 0a4.5 4.5 0 1 0 -9 0z',
  triangle: 'M0 -5.5L5 4H-5z',
  square: 'M-4.2 -4.2h8.4v8.4h-8.4z',
  diamond: 'M0 -5.5L5.5 0L0 5.5L-5.5 0z',
};

const WORDS: Record<Marker, { words: string; of: 'lightest' | 'stiffest'; beside: 'left' | 'right' }> = {
  circle: { words: 'gels, food, flesh', of: 'lightest', beside: 'left' },
  triangle: { words: 'rubbers', of: 'stiffest', beside: 'right' },
  square: { words: 'foams', of: 'stiffest', beside: 'right' },
  diamond: { words: 'stiff things', of: 'stiffest', beside: 'left' },
};

/** Stiffness against density, both logarithmic. Touch near a mark to choose it; the list beside it says the same. */
export function StiffnessChart({
  materials,
  chosen,
  height,
  onChoose,
}: {
  materials: readonly MaterialPreset[];
  chosen: string | null;
  height: number;
  onChoose: (id: string) => void;
}) {
  const { colors } = useTheme();
  const [width, setWidth] = useState(0);
  const decades = decadesOf(materials.map((m) => m.youngsModulus));
  const low = decades[0]!;
  const high = 2 * Math.max(...materials.map((m) => m.youngsModulus), low);
  const densities = DENSITIES.filter((_, k) => {
    const reach = materials.map((m) => m.density);
    return (DENSITIES[k + 1] ?? Infinity) >= Math.min(...reach) && (DENSITIES[k - 1] ?? 0) <= Math.max(...reach);
  });
  const [light, heavy] = [densities[0]!, densities[densities.length - 1]!];
  const x = (density: number) => LEFT + (Math.log(density / light) / Math.log(heavy / light)) * (width - LEFT - RIGHT);
  const y = (modulus: number) => TOP + (1 - Math.log(modulus / low) / Math.log(high / low)) * (height - TOP - FOOT);
  const here = materials.find((m) => m.id === chosen);
  const nearest = (px: number, py: number) => {
    const away = (m: MaterialPreset) => Math.hypot(x(m.density) - px, y(m.youngsModulus) - py);
    const best = [...materials].sort((a, b) => away(a) - away(b))[0];
    if (best && away(best) < REACH) onChoose(best.id);
  };
  return (
    <View
      role="img"
      aria-label={`Stiffness against density of ${materials.length} materials${here ? `; ${here.name} is chosen` : ''}`}
      style={[styles.chart, { height }]}
      onLayout={(event) => setWidth(event.nativeEvent.layout.width)}
      onStartShouldSetResponder={() => true}
      onResponderRelease={(event) => nearest(event.nativeEvent.locationX, event.nativeEvent.locationY)}
    >
      {width > 0 ? (
        <Svg width={width} height={height} style={styles.picture}>
          <SvgText x={0} y={12} fontFamily={SANS} fontSize={12} fill={colors.ink2}>
            Young’s modulus (log)
          </SvgText>
          {decades.map((e) => (
            <G key={e}>
              <Line x1={LEFT} x2={width - RIGHT} y1={y(e)} y2={y(e)} stroke={e === low ? colors.edge : colors.hair} />
              <SvgText x={LEFT - 8} y={y(e) + 4} textAnchor="end" fontFamily={MONO} fontSize={12} fill={colors.ink2}>
                {stressText(e)}
              </SvgText>
            </G>
          ))}
          {densities.map((d) => (
            <G key={d}>
              <Line x1={x(d)} x2={x(d)} y1={height - FOOT} y2={height - FOOT + 5} stroke={colors.edge} />
              <SvgText
                x={x(d)}
                y={height - FOOT + 20}
                textAnchor={d === heavy ? 'end' : 'middle'}
                fontFamily={MONO}
                fontSize={12}
                fill={colors.ink2}
              >
                {d}
              </SvgText>
            </G>
          ))}
          <SvgText x={width - RIGHT} y={height - 6} textAnchor="end" fontFamily={SANS} fontSize={12} fill={colors.ink2}>
            density, kg/m³ (log)
          </SvgText>
          {materials.map((m) => (
            <Path
              key={m.id}
              d={MARKERS[markerOf(m)]}
              transform={`translate(${x(m.density).toFixed(1)} ${y(m.youngsModulus).toFixed(1)})`}
              fill={m.id === chosen ? colors.kelp : colors.page}
              stroke={m.id === chosen ? colors.kelp : colors.ink}
              strokeWidth={1.5}
            />
          ))}
          {wordsOf(materials).map(({ words, beside, at }) => (
            <SvgText
              key={words}
              x={x(at.density) + (beside === 'left' ? -12 : 12)}
              y={y(at.youngsModulus) + 4}
              textAnchor={beside === 'left' ? 'end' : 'start'}
              fontFamily={SANS}
              fontSize={12}
              fontWeight="600"
              fill={colors.ink}
            >
              {words}
            </SvgText>
          ))}
          {here
            ? [colors.page, colors.kelp].map((colour, k) => (
                <SvgText
                  key={colour}
                  x={x(here.density) + (x(here.density) > width / 2 ? -12 : 12)}
                  y={y(here.youngsModulus) + 4}
                  textAnchor={x(here.density) > width / 2 ? 'end' : 'start'}
                  fontFamily={SANS}
                  fontSize={12}
                  fontWeight="600"
                  fill={colour}
                  stroke={k === 0 ? colour : undefined}
                  strokeWidth={k === 0 ? 4 : 0}
                >
                  {here.name}
                </SvgText>
              ))
            : null}
        </Svg>
      ) : null}
    </View>
  );
}

/** Powers of ten from just below the smallest value to the largest. */
function decadesOf(values: readonly number[]): number[] {
  const from = Math.floor(Math.log10(Math.min(...values)));
  const to = Math.floor(Math.log10(Math.max(...values)));
  return Array.from({ length: to - from + 1 }, (_, k) => 10 ** (from + k));
}

/** Where the words of a marker's kind stand: beside its outermost mark, on the side that is free. */
function wordsOf(materials: readonly MaterialPreset[]) {
  return (Object.keys(WORDS) as Marker[]).flatMap((marker) => {
    const own = materials.filter((m) => markerOf(m) === marker);
    const { words, of, beside } = WORDS[marker];
    const lightest = [...own].sort((a, b) => a.density - b.density)[0];
    const stiffest = [...own].sort((a, b) => b.youngsModulus - a.youngsModulus)[0];
    const at = of === 'lightest' ? lightest : stiffest;
    return at ? [{ words, beside, at }] : [];
  });
}

const styles = StyleSheet.create({
  chart: { width: '100%', cursor: 'pointer', userSelect: 'none' },
  picture: { pointerEvents: 'none' },
});
