import { BoxGeometry, Color, type BufferGeometry, Group, Mesh, MeshLambertMaterial, SphereGeometry } from 'three';
import type { SceneObstacle } from '../../solver/index';

/** Spheres and boxes that the body can hit, matte and cooler than the clay. */
export class StageSolids {
  readonly group = new Group();
  private readonly material = new MeshLambertMaterial();

  setColour(colour: string): void {
    this.material.color = new Color(colour);
  }

  set(obstacles: readonly SceneObstacle[]): void {
    this.clear();
    for (const obstacle of obstacles) {
      const placed = geometryOf(obstacle);
      if (!placed) continue;
      const mesh = new Mesh(placed.geometry, this.material);
      mesh.position.set(...placed.at);
      mesh.castShadow = true;
      mesh.receiveShadow = true;
      this.group.add(mesh);
    }
  }

  clear(): void {
    for (const child of [...this.group.children]) {
      (child as Mesh).geometry.dispose();
      this.group.remove(child);
    }
  }

  dispose(): void {
    this.clear();
    this.material.dispose();
  }
}

function geometryOf(obstacle: SceneObstacle): { geometry: BufferGeometry; at: [number, number, number] } | null {
  switch (obstacle.kind) {
    case 'sphere':
      return { geometry: new SphereGeometry(obstacle.radius, 48, 32), at: obstacle.centre };
    case 'box': {
      const { min, max } = obstacle;
      const geometry = new BoxGeometry(max[0] - min[0], max[1] - min[1], max[2] - min[2]);
      return { geometry, at: [0, 1, 2].map((d) => (min[d]! + max[d]!) / 2) as [number, number, number] };
    }
    case 'ground':
      return null;
  }
}
