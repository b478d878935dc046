import { useEffect, useRef, useState } from 'react';
import type { Vec3 } from '../../solver/index';
import { useTheme } from '../theme/use-theme';
import { OrbitCamera } from './orbit';
import type { SceneObstacle } from '../../solver/index';
import { StageOverlay } from './stage-overlay';
import { StageScene } from './stage-scene';
import type { StageMark, StageViewProps } from './stage-types';

// What screens need of the solver comes in this chunk too: anything that two chunks load moves into the first page.
export { decodeChunk, displaySurface, energyKept, scalePatch, surfaceFromRecipe } from '../../solver/index';

const TAP_PIXELS = 6;
const NONE: ReadonlySet<number> = new Set();
const NO_OBSTACLES: readonly SceneObstacle[] = [];
const NO_MARKS: readonly StageMark[] = [];

/** The ground's height, when there is one, and the lowest place of the other obstacles, m along up. */
function floorUnder(obstacles: readonly SceneObstacle[], up: 'y' | 'z'): { ground: number | null; foot: number } {
  const u = up === 'y' ? 1 : 2;
  let ground: number | null = null;
  let foot = Infinity;
  for (const obstacle of obstacles) {
    if (obstacle.kind === 'ground') ground = obstacle.height;
    else foot = Math.min(foot, obstacle.kind === 'sphere' ? obstacle.centre[u] - obstacle.radius : obstacle.min[u]);
  }
  return { ground, foot };
}

/** The live picture. Loaded on demand: it brings the 3-D library with it. */
export default function StageCanvas(props: StageViewProps & { onLost: () => void }) {
  const {
    surface,
    pose,
    scheme,
    up,
    obstacles = NO_OBSTACLES,
    tint = 'clay',
    chosen = NONE,
    seeThrough = false,
    label,
  } = props;
  const floor = floorUnder(obstacles, up);
  const theme = useTheme();
  const host = useRef<HTMLDivElement>(null);
  const canvas = useRef<HTMLCanvasElement>(null);
  const stage = useRef<{ scene: StageScene; draw: () => void } | null>(null);
  const [own] = useState(() => new OrbitCamera());
  const camera = props.camera ?? own;
  const latest = useRef(props);
  const colours = useRef({ ink: theme.colors.ink, page: theme.colors.page, apricot: theme.colors.apricot });
  const marks = useRef<(StageMark & { vertex: number })[]>([]);

  useEffect(() => {
    latest.current = props;
    colours.current = { ink: theme.colors.ink, page: theme.colors.page, apricot: theme.colors.apricot };
    marks.current = (props.marks ?? NO_MARKS).map((mark) => ({
      ...mark,
      vertex: nearestVertex(props.surface?.positions, mark.at),
    }));
    stage.current?.draw();
  });

  useEffect(() => {
    const element = canvas.current!;
    const box = host.current!;
    const scene = new StageScene(element, camera);
    const overlay = new StageOverlay(box);
    let asked = 0;
    let moved = true;
    const draw = () => {
      asked ||= requestAnimationFrame(() => {
        asked = 0;
        if (moved && latest.current.pose.coefficients) scene.setPose(latest.current.pose.coefficients);
        moved = false;
        scene.render();
        if (latest.current.surface) overlay.draw(scene, marks.current, latest.current.unit ?? 'mm', colours.current);
      });
    };
    const moveAndDraw = () => {
      moved = true;
      draw();
    };
    stage.current = { scene, draw: moveAndDraw };
    const observer = new ResizeObserver(() => {
      scene.resize(box.clientWidth, box.clientHeight);
      draw();
    });
    observer.observe(box);
    scene.resize(box.clientWidth, box.clientHeight);
    const ends = [camera.subscribe(draw), pose.subscribe(moveAndDraw), listen(element, scene, camera, latest)];
    const lost = (event: Event) => {
      event.preventDefault();
      latest.current.pose.set(latest.current.pose.coefficients);
      props.onLost();
    };
    element.addEventListener('webglcontextlost', lost);
    draw();
    return () => {
      cancelAnimationFrame(asked);
      observer.disconnect();
      ends.forEach((end) => end());
      element.removeEventListener('webglcontextlost', lost);
      overlay.remove();
      scene.dispose();
      stage.current = null;
    };
    // The picture is made once for a camera and a pose source; everything else is handed on below.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [camera, pose]);

  useEffect(() => {
    stage.current?.scene.setScheme(scheme);
    stage.current?.draw();
  }, [scheme]);
  useEffect(() => {
    if (surface) stage.current?.scene.setSurface(surface, up, floor.ground, floor.foot);
    stage.current?.scene.setSeeThrough(seeThrough);
    stage.current?.draw();
    // eslint-disable-next-line react-hooks/exhaustive-deps -- see-through has an effect of its own
  }, [surface, up, floor.ground, floor.foot]);
  useEffect(() => {
    stage.current?.scene.setObstacles(obstacles);
    stage.current?.draw();
  }, [obstacles]);
  useEffect(() => {
    stage.current?.scene.setTint(tint, chosen);
    stage.current?.draw();
  }, [tint, chosen, surface]);
  useEffect(() => {
    stage.current?.scene.setSeeThrough(seeThrough);
    stage.current?.draw();
  }, [seeThrough]);

  return (
    <div ref={host} style={{ position: 'absolute', inset: 0 }}>
      <canvas
        ref={canvas}
        role="img"
        aria-label={label}
        tabIndex={0}
        style={{ width: '100%', height: '100%', display: 'block', touchAction: 'none', outlineOffset: -2 }}
      />
    </div>
  );
}

/** Turning, zooming, tapping and pulling, by mouse, touch and keys. */
function listen(
  element: HTMLCanvasElement,
  scene: StageScene,
  camera: OrbitCamera,
  latest: { readonly current: StageViewProps },
): () => void {
  const pointers = new Map<number, { x: number; y: number }>();
  let start = { x: 0, y: 0 };
  let tapped = false;
  let spread = 0;
  let pulling: { rest: Vec3; from: Vec3 } | null = null;
  const at = (event: PointerEvent | WheelEvent) => {
    const box = element.getBoundingClientRect();
    return { x: event.clientX - box.left, y: event.clientY - box.top };
  };
  const distance = () => {
    const [a, b] = [...pointers.values()];
    return a && b ? Math.hypot(a.x - b.x, a.y - b.y) : 0;
  };
  const down = (event: PointerEvent) => {
    element.setPointerCapture(event.pointerId);
    const place = at(event);
    pointers.set(event.pointerId, place);
    start = place;
    tapped = pointers.size === 1;
    spread = distance();
    if (pointers.size === 1 && latest.current.onPull) {
      const hit = scene.hit(place.x, place.y);
      if (hit) pulling = { rest: hit.rest, from: hit.point };
    }
  };
  const move = (event: PointerEvent) => {
    const before = pointers.get(event.pointerId);
    if (!before) return;
    const place = at(event);
    pointers.set(event.pointerId, place);
    if (Math.hypot(place.x - start.x, place.y - start.y) > TAP_PIXELS) tapped = false;
    if (tapped) return;
    if (pointers.size >= 2) {
      const now = distance();
      if (spread > 0 && now > 0) camera.zoom(spread / now);
      spread = now;
    } else if (pulling) {
      latest.current.onPull?.({ rest: pulling.rest, target: scene.dragPoint(place.x, place.y, pulling.from) });
    } else {
      camera.turn((place.x - before.x) * 0.008, (place.y - before.y) * 0.006);
    }
  };
  const up = (event: PointerEvent) => {
    if (!pointers.delete(event.pointerId)) return;
    if (pulling) latest.current.onPull?.(null);
    pulling = null;
    if (tapped && event.type === 'pointerup') {
      const place = at(event);
      const hit = scene.hit(place.x, place.y);
      if (hit) latest.current.onPick?.(hit);
    }
    spread = distance();
  };
  const wheel = (event: WheelEvent) => {
    event.preventDefault();
    camera.zoom(Math.exp(Math.max(-120, Math.min(120, event.deltaY)) * 0.0015));
  };
  const key = (event: KeyboardEvent) => {
    const turns: Record<string, [number, number]> = {
      ArrowLeft: [-0.1, 0],
      ArrowRight: [0.1, 0],
      ArrowUp: [0, 0.08],
      ArrowDown: [0, -0.08],
    };
    const turn = turns[event.key];
    if (turn) camera.turn(...turn);
    else if (event.key === '+' || event.key === '=') camera.zoom(0.9);
    else if (event.key === '-') camera.zoom(1.1);
    else return;
    event.preventDefault();
    event.stopPropagation();
  };
  element.addEventListener('pointerdown', down);
  element.addEventListener('pointermove', move);
  element.addEventListener('pointerup', up);
  element.addEventListener('pointercancel', up);
  element.addEventListener('wheel', wheel, { passive: false });
  element.addEventListener('keydown', key);
  return () => {
    element.removeEventListener('pointerdown', down);
    element.removeEventListener('pointermove', move);
    element.removeEventListener('pointerup', up);
    element.removeEventListener('pointercancel', up);
    element.removeEventListener('wheel', wheel);
    element.removeEventListener('keydown', key);
  };
}

function nearestVertex(positions: Float32Array | undefined, at: Vec3): number {
  if (!positions) return 0;
  let best = 0;
  let least = Infinity;
  for (let v = 0; 3 * v < positions.length; v++) {
    const d =
      (positions[3 * v]! - at[0]) ** 2 + (positions[3 * v + 1]! - at[1]) ** 2 + (positions[3 * v + 2]! - at[2]) ** 2;
    if (d < least) {
      least = d;
      best = v;
    }
  }
  return best;
}
