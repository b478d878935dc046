import { useCallback, useEffect, useRef, useState } from 'react';

export type Pace = 0.25 | 0.5 | 1 | 2;

/** The clock of a player: a frame number that runs, steps and is scrubbed. Loops at the end. */
export function useClock(frames: number, framesPerSecond: number) {
  const [frame, setFrameState] = useState(0);
  const [playing, setPlaying] = useState(false);
  const [pace, setPace] = useState<Pace>(1);
  const exact = useRef(0);
  const setFrame = useCallback(
    (next: number) => {
      exact.current = Math.max(0, Math.min(frames, next));
      setFrameState(Math.round(exact.current));
    },
    [frames],
  );
  useEffect(() => {
    if (!playing) return;
    let before = performance.now();
    let asked = 0;
    const tick = (now: number) => {
      exact.current += ((now - before) / 1000) * framesPerSecond * pace;
      before = now;
      if (exact.current > frames) exact.current = 0;
      setFrameState(Math.floor(exact.current));
      asked = requestAnimationFrame(tick);
    };
    asked = requestAnimationFrame(tick);
    return () => cancelAnimationFrame(asked);
  }, [playing, pace, frames, framesPerSecond]);
  const step = useCallback(
    (by: number) => {
      setPlaying(false);
      setFrame(Math.round(exact.current) + by);
    },
    [setFrame],
  );
  useEffect(() => {
    const key = (event: KeyboardEvent) => {
      const target = event.target as HTMLElement;
      if (/^(INPUT|TEXTAREA|CANVAS)$/.test(target.tagName) || event.ctrlKey || event.metaKey || event.altKey) return;
      if (event.key === 'ArrowRight') step(event.shiftKey ? 10 : 1);
      else if (event.key === 'ArrowLeft') step(event.shiftKey ? -10 : -1);
      else if (event.key === 'Home') step(-frames);
      else if (event.key === 'End') step(frames);
      else if (event.key === ' ' && target.getAttribute('role') !== 'button') setPlaying((now) => !now);
      else return;
      event.preventDefault();
    };
    window.addEventListener('keydown', key);
    return () => window.removeEventListener('keydown', key);
  }, [step, frames]);
  return {
    frame,
    playing,
    pace,
    setPace,
    toggle: () => setPlaying((now) => !now),
    step,
    scrub: (next: number) => {
      setPlaying(false);
      setFrame(next);
    },
  };
}

export type Clock = ReturnType<typeof useClock>;
