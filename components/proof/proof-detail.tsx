import { useMemo } from 'react';
import { StyleSheet, View } from 'react-native';
import type { ProofResult } from '../../solver/index';
import { XyPlot } from '../charts/xy-plot';
import { estimateWords } from '../solver-client/estimate-words';
import { PoseSource } from '../stage/pose-source';
import { StageView } from '../stage/stage-view';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Fact } from '../ui/fact';
import { Text } from '../ui/text';
import type { CheckWords } from './checks';
import { errorText, hereText, textbookText, verdict } from './row-words';
import type { CheckState } from './use-proof';

/** One check: what was set up, the body, its points on the textbook's line, every number. */
export function ProofDetail({ words, check }: { words: CheckWords; check: CheckState }) {
  return (
    <View style={styles.detail}>
      <View style={styles.head}>
        <Text variant="section" level={2}>
          {words.title}
        </Text>
        <Text variant="note" color="ink2">
          {words.setUp}
        </Text>
      </View>
      {check.state === 'done' ? (
        <Found key={words.id} title={words.title} result={check.answer.result} />
      ) : (
        <Text
          color={check.state === 'failed' ? 'apricot' : 'ink2'}
          role={check.state === 'failed' ? 'alert' : undefined}
        >
          {check.state === 'failed'
            ? check.message
            : check.state === 'running'
              ? 'Being computed …'
              : 'Run the sheet to see it computed on this device.'}
        </Text>
      )}
      <Text variant="note" color="ink2">
        {words.textbook}
      </Text>
    </View>
  );
}

function Found({ title, result }: { title: string; result: ProofResult }) {
  const { colors, scheme } = useTheme();
  const { wide } = useBreakpoint();
  const { body, rows, plot, estimate } = result;
  const pose = useMemo(() => {
    const source = new PoseSource();
    source.set(body.coefficients);
    return source;
  }, [body]);
  const drawn = body.magnified === 1 ? 'drawn true to size' : `movement drawn ${body.magnified} times`;
  const compared = estimate && estimateWords(estimate);
  return (
    <>
      <View style={[styles.stage, { borderColor: colors.hair }]}>
        <StageView
          label={`${title}: the body as it came out, ${drawn}`}
          surface={body.surface}
          pose={pose}
          scheme={scheme}
          up="z"
          unit="mm"
        >
          <View style={styles.corner} pointerEvents="none">
            <Text variant="note" color="ink2">
              {drawn}
            </Text>
          </View>
        </StageView>
      </View>
      <XyPlot {...plot} height={wide ? 300 : 260} />
      <Text variant="dense">{verdict(rows)}</Text>
      <View>
        {rows.map((row) => (
          <Fact
            key={row.what}
            name={row.what}
            value={errorText(row)}
            note={`textbook ${textbookText(row)}, here ${hereText(row)}`}
          />
        ))}
        {compared ? <Fact name="Finer parts, ν = 0.3" words={compared.answer} note={compared.note} /> : null}
      </View>
    </>
  );
}

const styles = StyleSheet.create({
  detail: { gap: 14 },
  head: { gap: 2 },
  stage: { height: 240, borderWidth: 1 },
  corner: { position: 'absolute', left: 12, top: 10 },
});
