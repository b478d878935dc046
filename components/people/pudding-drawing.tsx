import { useMemo } from 'react';
import Svg, { Defs, Ellipse, G, Line, Path, RadialGradient, Rect, Stop, Text as SvgText } from 'react-native-svg';
import { STAGE_COLOURS } from '../stage/stage-colours';
import { useTheme } from '../theme/use-theme';
import { puddingPicture, SHADES } from './pudding-shape';

const BOX = { x: -176, y: -172, width: 376, height: 292 };
const MONO = "'IBM Plex Mono', monospace";

/** The steamed pudding as a measured drawing: the body in soft light, its centre line and three dimensions. */
export function PuddingDrawing({ width }: { width: number }) {
  const { colors, scheme } = useTheme();
  const picture = useMemo(puddingPicture, []);
  const half = picture.width / 2;
  const plate = picture.plateWidth / 2;
  // Twelve pixels at the least, whatever the scale of the drawing.
  const size = Math.max(9, (12.5 * BOX.width) / width);
  const mm = (length: number) => `${Math.round(length)} mm`;
  return (
    <Svg
      width={width}
      height={(width * BOX.height) / BOX.width}
      viewBox={`${BOX.x} ${BOX.y} ${BOX.width} ${BOX.height}`}
      role="img"
      aria-label={`Measured drawing of a steamed pudding, ${mm(picture.width)} wide and ${mm(picture.height)} high, on a plate of ${mm(picture.plateWidth)}`}
    >
      <Defs>
        <RadialGradient id="shadow" cx="50%" cy="50%" rx="50%" ry="50%">
          <Stop offset="0.55" stopColor={SHADOW} stopOpacity={scheme === 'day' ? 0.34 : 0.6} />
          <Stop offset="1" stopColor={SHADOW} stopOpacity={0} />
        </RadialGradient>
      </Defs>
      <Ellipse cx={12} cy={20} rx={140} ry={50} fill="url(#shadow)" />
      <Facets paths={picture.plate} colour={STAGE_COLOURS[scheme].core} />
      <Ellipse cx={10} cy={2} rx={92} ry={30} fill="url(#shadow)" />
      <Facets paths={picture.pudding} colour={STAGE_COLOURS[scheme].clay} />
      <Line
        x1={0}
        x2={0}
        y1={-160}
        y2={56}
        stroke={colors.phantom}
        strokeWidth={0.6}
        strokeDasharray="14 2.5 2.5 2.5"
      />
      <Across from={-half} to={half} y={-140} down={-84} label={mm(picture.width)} size={size} />
      <Across from={-plate} to={plate} y={84} down={-2} label={mm(picture.plateWidth)} size={size} />
      <Up x={162} from={picture.top} to={picture.foot} inner={44} foot={86} label={mm(picture.height)} size={size} />
    </Svg>
  );
}

const SHADOW = 'black';

function Facets({ paths, colour }: { paths: readonly string[]; colour: string }) {
  const ground = darker(colour, 0.8);
  return (
    <G>
      {/* Under the facets, so that nothing shows through the seams between them. */}
      <Path d={paths.join('')} fill={ground} stroke={ground} strokeWidth={0.8} strokeLinejoin="round" />
      {paths.map((d, shade) => {
        if (d === '') return null;
        const fill = darker(colour, 0.42 + (0.64 * shade) / (SHADES - 1));
        return <Path key={shade} d={d} fill={fill} stroke={fill} strokeWidth={0.4} strokeLinejoin="round" />;
      })}
    </G>
  );
}

/** A colour at a share of its light. */
function darker(hex: string, light: number): string {
  const part = (at: number) => Math.round(Math.min(255, parseInt(hex.slice(at, at + 2), 16) * light));
  return `rgb(${part(1)}, ${part(3)}, ${part(5)})`;
}

function Across({
  from,
  to,
  y,
  down,
  label,
  size,
}: {
  from: number;
  to: number;
  y: number;
  down: number;
  label: string;
  size: number;
}) {
  const { colors } = useTheme();
  const away = Math.sign(down - y);
  return (
    <G>
      {[from, to].map((x) => (
        <Line key={x} x1={x} x2={x} y1={y - 4 * away} y2={down} stroke={colors.edge} strokeWidth={0.5} />
      ))}
      <Line x1={from + 1} x2={to - 1} y1={y} y2={y} stroke={colors.ink} strokeWidth={0.6} />
      <Path d={`M${from} ${y}l6 -2v4zM${to} ${y}l-6 -2v4z`} fill={colors.ink} />
      <Label x={(from + to) / 2} y={y} label={label} size={size} />
    </G>
  );
}

function Up({
  x,
  from,
  to,
  inner,
  foot,
  label,
  size,
}: {
  x: number;
  from: number;
  to: number;
  inner: number;
  foot: number;
  label: string;
  size: number;
}) {
  const { colors } = useTheme();
  return (
    <G>
      <Line x1={inner} x2={x + 4} y1={from} y2={from} stroke={colors.edge} strokeWidth={0.5} />
      <Line x1={foot} x2={x + 4} y1={to} y2={to} stroke={colors.edge} strokeWidth={0.5} />
      <Line x1={x} x2={x} y1={from + 1} y2={to - 1} stroke={colors.ink} strokeWidth={0.6} />
      <Path d={`M${x} ${from}l-2 6h4zM${x} ${to}l-2 -6h4z`} fill={colors.ink} />
      <Label x={x} y={(from + to) / 2} label={label} size={size} />
    </G>
  );
}

/** The figure breaks the line it measures. */
function Label({ x, y, label, size }: { x: number; y: number; label: string; size: number }) {
  const { colors } = useTheme();
  const width = 0.68 * size * label.length;
  return (
    <G>
      <Rect x={x - width / 2} y={y - 0.7 * size} width={width} height={1.4 * size} fill={colors.stage} />
      <SvgText
        x={x}
        y={y + 0.35 * size}
        textAnchor="middle"
        fontFamily={MONO}
        fontSize={size}
        fontWeight="500"
        fill={colors.ink}
      >
        {label}
      </SvgText>
    </G>
  );
}
