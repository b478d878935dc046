import {
  BufferAttribute,
  BufferGeometry,
  Color,
  DirectionalLight,
  DoubleSide,
  HemisphereLight,
  Mesh,
  MeshLambertMaterial,
  VSMShadowMap,
  PerspectiveCamera,
  PlaneGeometry,
  Raycaster,
  Scene as ThreeScene,
  ShadowMaterial,
  Vector2,
  Vector3,
  WebGLRenderer,
} from 'three';
import { evaluateRows, type SceneObstacle, type SurfaceMap, type Vec3 } from '../../solver/index';
import { VERTICAL_FIELD_DEGREES, type OrbitCamera } from './orbit';
import { SmoothNormals } from './smooth-normals';
import { StageSolids } from './stage-solids';
import { STAGE_COLOURS, type Scheme } from './stage-colours';

export type Tint = 'clay' | 'parts' | 'left' | 'right';

export interface Hit {
  patch: number;
  vertex: number;
  /** rest place of the nearest vertex, m */
  rest: Vec3;
  /** where it was touched, m */
  point: Vec3;
}

/** The drawn scene: one body, soft light, a ground that only its shadow shows. Draws when asked. */
export class StageScene {
  private readonly renderer: WebGLRenderer;
  private readonly scene = new ThreeScene();
  private readonly camera = new PerspectiveCamera(VERTICAL_FIELD_DEGREES, 1, 0.01, 100);
  private readonly key = new DirectionalLight();
  private readonly overhead = new DirectionalLight();
  private readonly sky = new HemisphereLight();
  private readonly ground = new Mesh(new PlaneGeometry(1, 1), new ShadowMaterial());
  private readonly solids = new StageSolids();
  private body: Mesh<BufferGeometry, MeshLambertMaterial> | null = null;
  private surface: SurfaceMap | null = null;
  private normals: SmoothNormals | null = null;
  private scheme: Scheme = 'day';
  private tint: Tint = 'clay';
  private chosen: ReadonlySet<number> = new Set();
  private up: 'y' | 'z' = 'z';
  private radius = 1;
  private pixelRatio: number;
  private slowFrames = 0;
  width = 1;
  height = 1;

  constructor(
    canvas: HTMLCanvasElement,
    private readonly orbit: OrbitCamera,
  ) {
    this.renderer = new WebGLRenderer({ canvas, antialias: true, powerPreference: 'high-performance' });
    this.pixelRatio = Math.min(2, window.devicePixelRatio || 1);
    this.renderer.setPixelRatio(this.pixelRatio);
    this.renderer.shadowMap.enabled = true;
    this.renderer.shadowMap.type = VSMShadowMap;
    for (const [light, size] of [
      [this.key, 768],
      [this.overhead, 256],
    ] as const) {
      light.castShadow = true;
      light.shadow.mapSize.set(size, size);
      light.shadow.bias = -0.0005;
      light.shadow.normalBias = 0.01;
      this.scene.add(light, light.target);
    }
    // Variance shadows blur well, which is what an overcast sky asks for.
    this.key.shadow.radius = 7;
    this.key.shadow.blurSamples = 12;
    this.overhead.shadow.radius = 12;
    this.overhead.shadow.blurSamples = 12;
    this.ground.receiveShadow = true;
    this.scene.add(this.sky, this.ground, this.solids.group);
  }

  setScheme(scheme: Scheme): void {
    const colours = STAGE_COLOURS[scheme];
    this.scheme = scheme;
    this.scene.background = new Color(colours.ground);
    this.sky.color.set(colours.skyLight);
    this.sky.groundColor.set(colours.bounceLight);
    this.sky.intensity = colours.skyStrength;
    this.key.intensity = colours.keyStrength;
    this.overhead.intensity = 0.35;
    this.solids.setColour(colours.core);
    (this.ground.material as ShadowMaterial).opacity = colours.shadow;
    this.paint();
  }

  /** Takes a new surface; the camera frames the first one. */
  setSurface(surface: SurfaceMap, up: 'y' | 'z', ground: number | null, foot: number): void {
    this.up = up;
    this.surface = surface;
    this.body?.geometry.dispose();
    if (this.body) this.scene.remove(this.body);
    const geometry = new BufferGeometry();
    geometry.setAttribute('position', new BufferAttribute(surface.positions.slice(), 3));
    geometry.setAttribute('normal', new BufferAttribute(surface.normals.slice(), 3));
    geometry.setAttribute('color', new BufferAttribute(new Float32Array(surface.positions.length), 3));
    geometry.setIndex(new BufferAttribute(surface.triangles, 1));
    const { min, max } = bounds(surface.positions);
    this.radius = Math.hypot(max[0] - min[0], max[1] - min[1], max[2] - min[2]) / 2;
    this.normals = new SmoothNormals(surface.triangles, surface.positions, surface.normals, this.radius * 2e-5);
    this.body = new Mesh(geometry, new MeshLambertMaterial({ vertexColors: true, side: DoubleSide }));
    this.body.castShadow = true;
    this.body.receiveShadow = true;
    this.body.frustumCulled = false;
    this.scene.add(this.body);
    this.normals.update(geometry.getAttribute('normal').array as Float32Array, surface.positions);
    this.placeLights(min, max, ground ?? Math.min(foot, min[up === 'z' ? 2 : 1]));
    this.orbit.frame(min, max, this.width / this.height);
    this.paint();
  }

  setObstacles(obstacles: readonly SceneObstacle[]): void {
    this.solids.set(obstacles);
  }

  private placeLights(min: Vec3, max: Vec3, floor: number): void {
    const { radius: r } = this;
    const u = this.up === 'z' ? 2 : 1;
    const centre = new Vector3(...(min.map((x, d) => (x + max[d]!) / 2) as Vec3));
    this.camera.up.set(0, u === 1 ? 1 : 0, u === 2 ? 1 : 0);
    this.sky.position.copy(this.camera.up);
    const key = u === 2 ? new Vector3(-0.75, -0.55, 1.25) : new Vector3(-0.75, 1.25, 0.55);
    const above = this.camera.up.clone();
    for (const [light, direction] of [
      [this.key, key],
      [this.overhead, above],
    ] as const) {
      light.target.position.copy(centre);
      light.position.copy(centre).addScaledVector(direction.normalize(), 6 * r);
      const view = light.shadow.camera;
      view.left = view.bottom = -2.2 * r;
      view.right = view.top = 2.2 * r;
      view.near = r;
      view.far = 14 * r;
      view.up.set(0, u === 2 ? 1 : 0, u === 1 ? 1 : 0);
      view.updateProjectionMatrix();
      light.shadow.normalBias = r * 0.01;
    }
    this.ground.scale.setScalar(60 * r);
    this.ground.rotation.set(u === 1 ? -Math.PI / 2 : 0, 0, 0);
    this.ground.position.copy(centre);
    this.ground.position.setComponent(u, floor - r * 1e-3);
  }

  setTint(tint: Tint, chosen: ReadonlySet<number>): void {
    this.tint = tint;
    this.chosen = chosen;
    this.paint();
  }

  setSeeThrough(on: boolean): void {
    if (!this.body) return;
    this.body.material.transparent = on;
    this.body.material.opacity = on ? 0.25 : 1;
    this.body.material.depthWrite = !on;
    this.body.material.needsUpdate = true;
  }

  private paint(): void {
    const { body, surface } = this;
    if (!body || !surface) return;
    const colours = STAGE_COLOURS[this.scheme];
    const base = new Color(this.tint === 'left' ? colours.left : this.tint === 'right' ? colours.right : colours.clay);
    const tints = colours.parts.map((hex) => new Color(hex));
    const chosen = new Color(colours.chosen).lerp(base, 0.35);
    const attribute = body.geometry.getAttribute('color') as BufferAttribute;
    for (let v = 0; v < surface.patch.length; v++) {
      const colour = this.chosen.has(surface.patch[v]!)
        ? chosen
        : this.tint === 'parts'
          ? tints[surface.dominantPart[v]! % tints.length]!
          : base;
      attribute.setXYZ(v, colour.r, colour.g, colour.b);
    }
    attribute.needsUpdate = true;
  }

  /** Moves the body to the pose of these coefficients. */
  setPose(coefficients: Float64Array): void {
    const { body, surface, normals } = this;
    if (!body || !surface || !normals) return;
    const { rows } = surface;
    const position = body.geometry.getAttribute('position') as BufferAttribute;
    const normal = body.geometry.getAttribute('normal') as BufferAttribute;
    // A pose of another part count arrives for a moment while the surface is exchanged.
    if (
      coefficients.length % (3 * rows.basis) !== 0 ||
      coefficients.length / (3 * rows.basis) < largestPart(rows.parts) + 1
    )
      return;
    evaluateRows(position.array as Float32Array, rows, coefficients);
    normals.update(normal.array as Float32Array, position.array as Float32Array);
    position.needsUpdate = true;
    normal.needsUpdate = true;
    body.geometry.boundingSphere = null;
  }

  resize(width: number, height: number): void {
    this.width = Math.max(1, width);
    this.height = Math.max(1, height);
    this.renderer.setSize(this.width, this.height, false);
    this.camera.aspect = this.width / this.height;
    this.camera.updateProjectionMatrix();
  }

  render(): void {
    const { azimuth, elevation, distance, target } = this.orbit.orbit;
    const flat = Math.cos(elevation) * distance;
    const [x, y] = [Math.cos(azimuth) * flat, Math.sin(azimuth) * flat];
    const rise = Math.sin(elevation) * distance;
    if (this.up === 'z') this.camera.position.set(target[0] + x, target[1] + y, target[2] + rise);
    else this.camera.position.set(target[0] + x, target[1] + rise, target[2] - y);
    this.camera.lookAt(target[0], target[1], target[2]);
    this.camera.near = distance / 50;
    this.camera.far = distance * 12;
    this.camera.updateProjectionMatrix();
    const begin = performance.now();
    this.renderer.render(this.scene, this.camera);
    this.adapt(performance.now() - begin);
  }

  /** On a slow machine the picture gets coarser until a frame takes less than a twentieth of a second. */
  private adapt(milliseconds: number): void {
    this.slowFrames = milliseconds > 50 ? this.slowFrames + 1 : Math.max(0, this.slowFrames - 1);
    if (this.slowFrames < 4 || this.pixelRatio <= 0.75) return;
    this.slowFrames = 0;
    this.pixelRatio = Math.max(0.75, this.pixelRatio * 0.8);
    this.renderer.setPixelRatio(this.pixelRatio);
    this.renderer.setSize(this.width, this.height, false);
    // Resizing empties the canvas, and nobody may ask for another picture soon.
    this.renderer.render(this.scene, this.camera);
  }

  /** Place on the canvas, in CSS pixels, of a point in metres; null behind the camera. */
  project(point: Vec3): { x: number; y: number } | null {
    const p = new Vector3(...point).project(this.camera);
    if (p.z > 1) return null;
    return { x: ((p.x + 1) / 2) * this.width, y: ((1 - p.y) / 2) * this.height };
  }

  /** Metres a CSS pixel stands for at the camera's target. */
  get metresPerPixel(): number {
    return (2 * this.orbit.orbit.distance * Math.tan((VERTICAL_FIELD_DEGREES * Math.PI) / 360)) / this.height;
  }

  /** What lies under a place on the canvas (CSS pixels). */
  hit(x: number, y: number): Hit | null {
    const { body, surface } = this;
    if (!body || !surface) return null;
    const caster = new Raycaster();
    caster.setFromCamera(new Vector2((2 * x) / this.width - 1, 1 - (2 * y) / this.height), this.camera);
    const found = caster.intersectObject(body)[0];
    if (!found?.face) return null;
    const vertex = found.face.a;
    return {
      patch: surface.patch[vertex]!,
      vertex,
      rest: [surface.positions[3 * vertex]!, surface.positions[3 * vertex + 1]!, surface.positions[3 * vertex + 2]!],
      point: [found.point.x, found.point.y, found.point.z],
    };
  }

  /** The point under the pointer in the plane through `through` that faces the camera: where a pull drags to. */
  dragPoint(x: number, y: number, through: Vec3): Vec3 {
    const caster = new Raycaster();
    caster.setFromCamera(new Vector2((2 * x) / this.width - 1, 1 - (2 * y) / this.height), this.camera);
    const facing = this.camera.getWorldDirection(new Vector3());
    const origin = caster.ray.origin;
    const direction = caster.ray.direction;
    const t = new Vector3(...through).sub(origin).dot(facing) / direction.dot(facing);
    const p = origin.clone().addScaledVector(direction, t);
    return [p.x, p.y, p.z];
  }

  /** Present position of a vertex of the drawn surface, m. */
  vertex(index: number): Vec3 {
    const position = this.body!.geometry.getAttribute('position');
    return [position.getX(index), position.getY(index), position.getZ(index)];
  }

  dispose(): void {
    this.body?.geometry.dispose();
    this.solids.dispose();
    this.renderer.dispose();
  }
}

const largest = new WeakMap<Int32Array, number>();
function largestPart(parts: Int32Array): number {
  let value = largest.get(parts);
  if (value === undefined) {
    value = parts.reduce((a, b) => Math.max(a, b), 0);
    largest.set(parts, value);
  }
  return value;
}

function bounds(positions: Float32Array): { min: Vec3; max: Vec3 } {
  const min: Vec3 = [Infinity, Infinity, Infinity];
  const max: Vec3 = [-Infinity, -Infinity, -Infinity];
  for (let i = 0; i < positions.length; i += 3) {
    for (let d = 0; d < 3; d++) {
      min[d] = Math.min(min[d]!, positions[i + d]!);
      max[d] = Math.max(max[d]!, positions[i + d]!);
    }
  }
  return { min, max };
}
