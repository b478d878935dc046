import { router } from 'expo-router';
import { useEffect } from 'react';
import { ScrollView, StyleSheet, View } from 'react-native';
import { timeCode } from '../../shared/time-code';
import { dateText, lengthUnitFor } from '../../shared/units';
import { StageView } from '../stage/stage-view';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { Alone } from '../ui/alone';
import { Card } from '../ui/card';
import { Fact } from '../ui/fact';
import { PhoneHead } from '../ui/phone-head';
import { Caution, Fault, Loading } from '../ui/states';
import { Text } from '../ui/text';
import { TitleBlock } from '../ui/title-block';
import { CloseUp, FrameRule } from './frame-rule';
import { furthest, gaugeDistance, gaugeTitle, worstCompression } from './gauge-series';
import { PlayControls } from './play-controls';
import { useClock } from './use-clock';
import { useRun, type OpenRun } from './use-run';

/** A run to scrub: made for a thumb, good on a desk. */
export function RunPlayerScreen({ runId }: { runId: string }) {
  const open = useRun(runId);
  if (!open.run) {
    return (
      <Alone>
        {open.fault ? (
          <Fault title="This run could not be opened.">{open.fault}</Fault>
        ) : (
          <Loading>Fetching the run …</Loading>
        )}
      </Alone>
    );
  }
  return <Player open={open} />;
}

function Player({ open }: { open: OpenRun }) {
  const run = open.run!;
  const { wide } = useBreakpoint();
  const { scheme, colors } = useTheme();
  const clock = useClock(run.frames, run.framesPerSecond);
  const { poses, source, arrived, surface, traces, document } = open;
  useEffect(() => {
    source.set(poses?.at(clock.frame) ?? null);
  }, [source, poses, clock.frame, arrived]);
  const unit = lengthUnitFor(run.provenance.diagonal);
  const all = run.frames + 1;
  const title = `Run ${run.number}, ${run.scene.name}`;
  const stage = (
    <StageView
      label={`${title}, frame ${clock.frame}`}
      surface={surface}
      pose={source}
      scheme={scheme}
      up={document?.up ?? 'z'}
      obstacles={document?.obstacles}
      unit={unit}
      marks={(document?.gauges ?? []).map((g) => ({ id: g.id, kind: 'gauge' as const, at: g.point }))}
    >
      <View style={styles.corner} pointerEvents="none">
        <Text variant="readout">{timeCode(clock.frame, run.framesPerSecond)}</Text>
        <Text variant="note" color={open.fault ? 'apricot' : 'ink2'}>
          {open.fault ??
            (!surface
              ? 'Setting up the body …'
              : arrived < all
                ? `${arrived} of ${all} frames have arrived`
                : run.status === 'complete'
                  ? ''
                  : 'This run is unfinished.')}
        </Text>
      </View>
      <TitleBlock
        cells={[
          { label: 'Model', value: run.model.name, wide: true },
          { label: 'Scene', value: run.scene.name, wide: true },
          { label: 'Revision', value: String(run.revision.number), mono: true },
          { label: 'Run', value: String(run.number), mono: true },
          { label: 'Frame', value: `${clock.frame} of ${run.frames}`, mono: true },
        ]}
        phone={[
          { label: 'Revision', value: String(run.revision.number), mono: true },
          { label: 'Frame', value: `${clock.frame} of ${run.frames}`, mono: true },
        ]}
      />
    </StageView>
  );
  const rule = (
    <FrameRule
      frames={run.frames}
      frame={clock.frame}
      arrived={arrived}
      series={[{ name: 'moved', values: gaugeDistance(traces) }]}
      title={gaugeTitle(traces)}
      unit="mm"
      onFrame={clock.scrub}
    />
  );
  const beside = (
    <Button
      label={wide ? 'Set beside another run' : 'Set beside'}
      kind={wide ? 'plain' : 'quiet'}
      hint="Choose the other run on the page of runs"
      onPress={() => router.push({ pathname: '/runs', params: { left: run.id } })}
    />
  );
  if (!wide) {
    return (
      <View style={styles.fill}>
        <PhoneHead title={title} back="/runs">
          {run.status === 'complete' ? beside : null}
        </PhoneHead>
        <View style={styles.fill}>{stage}</View>
        <View style={[styles.thumb, { borderTopColor: colors.hair }]}>
          {rule}
          <CloseUp frames={run.frames} frame={clock.frame} onFrame={clock.scrub} />
          <View style={styles.pad}>
            <PlayControls clock={clock} spread />
          </View>
        </View>
      </View>
    );
  }
  return (
    <View style={styles.split}>
      <View style={styles.fill}>
        <View style={styles.fill}>{stage}</View>
        <View style={[styles.thumb, { borderTopColor: colors.hair }]}>
          {rule}
          <View style={styles.pad}>
            <PlayControls clock={clock} />
          </View>
        </View>
      </View>
      <ScrollView style={[styles.column, { borderLeftColor: colors.hair }]}>
        <Card title={title} summary={`revision ${run.revision.number}`} folds={false}>
          <Fact name="Baked by" words={`${run.createdBy.name}, ${dateText(run.completedAt ?? run.createdAt)}`} />
          <Fact
            name={run.provenance.materials.length > 1 ? 'Materials' : 'Material'}
            words={run.provenance.materials.map((m) => m.name).join(', ')}
          />
          <Fact name="Part count" value={String(run.provenance.partCount)} />
          <Fact name="Frames" value={`${run.frames} at ${run.framesPerSecond} f/s`} />
          <Fact name="Solver" words={`version ${run.provenance.solverVersion}, ${run.provenance.kernels}`} />
          {traces?.gauges[0] ? (
            <Fact name={`${traces.gauges[0].id} furthest`} value={`${furthest(traces).toFixed(1)} mm`} />
          ) : null}
          {traces ? (
            <Fact
              name="Worst compression"
              value={worstCompression(traces).toFixed(2)}
              note="1 is the volume at rest."
            />
          ) : null}
          {run.status === 'complete' ? <View style={styles.beside}>{beside}</View> : null}
          <Caution />
          <Text variant="note" color="ink2">
            Space plays, arrows step, Shift and arrows step ten, Home and End go to the ends.
          </Text>
        </Card>
      </ScrollView>
    </View>
  );
}

const styles = StyleSheet.create({
  fill: { flex: 1, minHeight: 0, minWidth: 0 },
  split: { flex: 1, flexDirection: 'row' },
  column: { width: 340, flexGrow: 0, borderLeftWidth: 1 },
  beside: { marginTop: 8 },
  corner: { position: 'absolute', left: 12, top: 10 },
  thumb: { borderTopWidth: 1, paddingVertical: 8, gap: 4 },
  pad: { paddingHorizontal: 16 },
});
