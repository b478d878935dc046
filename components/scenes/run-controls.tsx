import { useState } from 'react';
import { View } from 'react-native';
import type { LiveSpeed } from '../../solver/index';
import { Button } from '../ui/button';
import { ChoiceOfFew } from '../ui/choice-of-few';
import type { Live } from './use-live';

export type Show = 'clay' | 'parts' | 'see-through';

/** Play, step, back to rest, and how fast against the clock. */
export function RunControls({
  live,
  baking = false,
  compact = false,
}: {
  live: Live;
  /** the solver is busy with a bake */
  baking?: boolean;
  compact?: boolean;
}) {
  const [speed, setSpeed] = useState<LiveSpeed>('real-time');
  const waiting = live.ready && !baking ? null : '';
  return (
    <View style={{ flexDirection: 'row', gap: 8 }}>
      {live.playing ? (
        <Button label="Pause" onPress={live.pause} />
      ) : (
        <Button label="Play" disabledReason={waiting} onPress={() => live.play(compact ? 'real-time' : speed)} />
      )}
      <Button label="Step" disabledReason={waiting} onPress={live.step} />
      <Button label={compact ? 'Rest' : 'Back to rest'} disabledReason={waiting} onPress={live.rest} />
      {compact ? null : (
        <ChoiceOfFew
          label="Speed against the clock"
          value={live.playing ?? speed}
          onChange={(next) => {
            setSpeed(next);
            if (live.playing) live.play(next);
          }}
          options={[
            { value: 'slow', label: 'Slow' },
            { value: 'real-time', label: 'Real time' },
            { value: 'flat-out', label: 'Flat out' },
          ]}
        />
      )}
    </View>
  );
}

/** How the body is drawn. */
export function ShowControls({ show, onShow }: { show: Show; onShow: (show: Show) => void }) {
  return (
    <ChoiceOfFew
      label="Show"
      value={show}
      onChange={onShow}
      options={[
        { value: 'clay', label: 'Clay' },
        { value: 'parts', label: 'Parts' },
        { value: 'see-through', label: 'See-through' },
      ]}
    />
  );
}
