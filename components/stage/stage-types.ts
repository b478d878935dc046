import type { ReactNode } from 'react';
import type { SceneObstacle, SurfaceMap, Vec3 } from '../../solver/index';
import type { OrbitCamera } from './orbit';
import type { PoseSource } from './pose-source';
import type { Scheme } from './stage-colours';
import type { Hit, Tint } from './stage-scene';

/** A lettered mark on the body: G1 a gauge, S1 a support, L1 a load. */
export interface StageMark {
  id: string;
  kind: 'gauge' | 'support' | 'load';
  /** what stands beside the letter, for example "0.60 N" */
  text?: string;
  /** rest place, m; the mark follows the nearest vertex of the surface */
  at: Vec3;
  /** loads: which way they push */
  direction?: Vec3;
}

export interface StageViewProps {
  /** What is shown, in words, for people who cannot see it. */
  label: string;
  surface: SurfaceMap | null;
  pose: PoseSource;
  scheme: Scheme;
  up: 'y' | 'z';
  /** What the body can hit; without a ground among them the shadow falls right under the body. */
  obstacles?: readonly SceneObstacle[];
  tint?: Tint;
  /** Patches drawn in the action colour. */
  chosen?: ReadonlySet<number>;
  seeThrough?: boolean;
  marks?: readonly StageMark[];
  /** Shared by stages that should turn together. */
  camera?: OrbitCamera;
  /** Length unit of the scale bar. */
  unit?: 'mm' | 'cm' | 'm';
  /** A tap on the body. */
  onPick?: (hit: Hit) => void;
  /** Dragging the body: called with where it was taken (rest, m) and where it is pulled to; null lets go. */
  onPull?: (pull: { rest: Vec3; target: Vec3 } | null) => void;
  /** Laid over the stage: title block, readouts. */
  children?: ReactNode;
}
