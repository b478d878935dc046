import { router } from 'expo-router';
import { useEffect, useState } from 'react';
import { ScrollView, StyleSheet, View } from 'react-native';
import { lengthUnitFor } from '../../shared/units';
import { FrameRule } from '../runs/frame-rule';
import { gaugeDistance, gaugeTitle } from '../runs/gauge-series';
import { PlayControls } from '../runs/play-controls';
import { useClock } from '../runs/use-clock';
import { useRun, type OpenRun } from '../runs/use-run';
import { OrbitCamera } from '../stage/orbit';
import { StageView } from '../stage/stage-view';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { Alone } from '../ui/alone';
import { PhoneHead } from '../ui/phone-head';
import { Empty, Fault, Loading } from '../ui/states';
import { Text } from '../ui/text';
import { Differences } from './differences';

/** Two runs on one clock and one camera, and what differs between them. */
export function SideBySideScreen({ left, right }: { left?: string; right?: string }) {
  if (!left || !right) {
    return (
      <Alone>
        <Empty
          title="Two runs are needed."
          action={<Button label="Choose two" onPress={() => router.replace('/runs')} />}
        >
          Choose them on the page of runs.
        </Empty>
      </Alone>
    );
  }
  return <Pair left={left} right={right} />;
}

function Pair({ left, right }: { left: string; right: string }) {
  const a = useRun(left);
  const b = useRun(right);
  const fault = [a, b].find((open) => open.fault && !open.run)?.fault;
  if (!a.run || !b.run) {
    return (
      <Alone>
        {fault ? (
          <Fault title="These runs could not be opened.">{fault}</Fault>
        ) : (
          <Loading>Fetching the runs …</Loading>
        )}
      </Alone>
    );
  }
  return <SideBySide a={a} b={b} />;
}

function SideBySide({ a, b }: { a: OpenRun; b: OpenRun }) {
  const { wide } = useBreakpoint();
  const { colors } = useTheme();
  const [camera] = useState(() => new OrbitCamera());
  const frames = Math.max(a.run!.frames, b.run!.frames);
  const clock = useClock(frames, a.run!.framesPerSecond);
  const rule = (
    <FrameRule
      frames={frames}
      frame={clock.frame}
      arrived={Math.min(a.arrived, b.arrived)}
      series={[
        { name: `run ${a.run!.number}`, values: gaugeDistance(a.traces), kind: 'left' },
        { name: `run ${b.run!.number}`, values: gaugeDistance(b.traces), kind: 'right' },
      ]}
      title={gaugeTitle(a.traces)}
      unit="mm"
      onFrame={clock.scrub}
    />
  );
  const stages = (
    <View style={[styles.stages, wide && styles.row]}>
      <Half open={a} side="left" frame={clock.frame} camera={camera} />
      <View style={[wide ? styles.upright : styles.level, { backgroundColor: colors.ink }]} />
      <Half open={b} side="right" frame={clock.frame} camera={camera} />
    </View>
  );
  const controls = (
    <View style={[styles.rule, { borderTopColor: colors.hair }]}>
      {rule}
      <View style={styles.pad}>
        <PlayControls clock={clock} spread={!wide} />
      </View>
    </View>
  );
  if (!wide) {
    return (
      <View style={styles.fill}>
        <PhoneHead title={`Run ${a.run!.number} beside run ${b.run!.number}`} back="/runs" />
        {stages}
        {controls}
        <ScrollView style={styles.phoneTable}>
          <Differences a={a} b={b} most={3} />
        </ScrollView>
      </View>
    );
  }
  return (
    <View style={styles.split}>
      <View style={styles.fill}>
        {stages}
        {controls}
      </View>
      <ScrollView style={[styles.column, { borderLeftColor: colors.hair }]}>
        <Differences a={a} b={b} />
      </ScrollView>
    </View>
  );
}

function Half({
  open,
  side,
  frame,
  camera,
}: {
  open: OpenRun;
  side: 'left' | 'right';
  frame: number;
  camera: OrbitCamera;
}) {
  const { scheme, colors } = useTheme();
  const { source, poses, arrived, surface, document } = open;
  const run = open.run!;
  useEffect(() => {
    source.set(poses?.at(frame) ?? null);
  }, [source, poses, frame, arrived]);
  return (
    <View style={styles.fill}>
      <StageView
        label={`Run ${run.number}, ${side}, frame ${frame}`}
        surface={surface}
        pose={source}
        scheme={scheme}
        up={document?.up ?? 'z'}
        obstacles={document?.obstacles}
        tint={side}
        camera={camera}
        unit={lengthUnitFor(run.provenance.diagonal)}
      >
        <View style={styles.name} pointerEvents="none">
          <View style={[styles.bar, { backgroundColor: side === 'left' ? colors.kelp : colors.plum }]} />
          <Text variant="strong">{`Run ${run.number}`}</Text>
          <Text variant="note" color={open.fault ? 'apricot' : 'ink2'}>
            {open.fault ?? `${side === 'left' ? 'solid line' : 'dashed line'}, ${run.createdBy.name}`}
          </Text>
        </View>
      </StageView>
    </View>
  );
}

const styles = StyleSheet.create({
  fill: { flex: 1, minHeight: 0, minWidth: 0 },
  split: { flex: 1, flexDirection: 'row' },
  stages: { flex: 1, minHeight: 0 },
  row: { flexDirection: 'row' },
  upright: { width: 1 },
  level: { height: 1 },
  rule: { borderTopWidth: 1, paddingVertical: 8, gap: 4 },
  pad: { paddingHorizontal: 16 },
  column: { width: 368, flexGrow: 0, borderLeftWidth: 1 },
  phoneTable: { maxHeight: '26%' },
  name: { position: 'absolute', left: 12, top: 8, flexDirection: 'row', alignItems: 'center', gap: 8 },
  bar: { width: 4, height: 24 },
});
