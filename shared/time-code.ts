/**
 * HH:MM:SS:FF of a frame (SMPTE ST 12-1:2014). At 29.97 and 59.94 frames a second labels are dropped so that the code
 * keeps up with the clock: the first two (four) of every minute but each tenth; such a code ends in ;FF.
 */
export function timeCode(frame: number, framesPerSecond: number): string {
  const rate = Math.round(framesPerSecond);
  const dropped = droppedEachMinute(framesPerSecond, rate);
  const label = dropped > 0 ? frame + dropped * skippedMinutes(frame, rate, dropped) : frame;
  const seconds = Math.floor(label / rate);
  const two = (n: number) => String(n).padStart(2, '0');
  const clock = `${two(Math.floor(seconds / 3600))}:${two(Math.floor(seconds / 60) % 60)}:${two(seconds % 60)}`;
  return `${clock}${dropped > 0 ? ';' : ':'}${two(label % rate)}`;
}

/** Two at 30000/1001, four at 60000/1001; whole rates and 24000/1001 drop nothing. */
function droppedEachMinute(framesPerSecond: number, rate: number): number {
  const ntsc = Math.abs(framesPerSecond - (rate * 1000) / 1001) < 0.005 && framesPerSecond !== rate;
  return ntsc && rate % 30 === 0 ? rate / 15 : 0;
}

/** Minutes begun by this frame whose first labels were dropped. */
function skippedMinutes(frame: number, rate: number, dropped: number): number {
  const tenMinutes = 600 * rate - 9 * dropped;
  const minute = 60 * rate - dropped;
  const tens = Math.floor(frame / tenMinutes);
  // The first minute of ten keeps all its labels.
  const within = Math.max(0, (frame % tenMinutes) - 60 * rate);
  const past = frame % tenMinutes >= 60 * rate ? 1 + Math.floor(within / minute) : 0;
  return 9 * tens + past;
}
