import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { cantilever, SMALL_GRAVITY } from '../cases/cantilever/scene';
import { simulateCase } from '../cases/published-case';
import type { Kernels } from '../kernels/kernels';
import { round } from './statistics';

/** Tip of the bar under its own weight, ν = 0.3, m: solver/cases/cantilever/CASE.md. */
const EXPECTED = 0.001472304;

interface Answer {
  how: string;
  seconds: number;
  errorPercent: number;
}

/** Set-up and solve of the gauge bar at rest under its weight, median of three. */
export function meshlessBar(kernels: Kernels, parts: number): Answer {
  const answers = Array.from({ length: 4 }, () => {
    const begin = performance.now();
    const simulation = simulateCase(cantilever({ poissonsRatio: 0.3, parts, load: 'weight' }), kernels);
    simulation.solveStatic(1);
    const seconds = (performance.now() - begin) / 1000;
    const gauges = simulation.readouts().gauges;
    const tip = -gauges.reduce((sum, { displacement }) => sum + displacement[2], 0) / gauges.length;
    return { seconds, tip };
  }).slice(1);
  const { seconds, tip } = answers.sort((a, b) => a.seconds - b.seconds)[1]!;
  return {
    how: `${parts} quadratic parts, no mesh`,
    seconds: round(seconds),
    errorPercent: round(100 * (tip / EXPECTED - 1)),
  };
}

/** The same bar meshed by gmsh and solved by CalculiX, programs of Debian; null where they are not installed. */
export function meshedBar(order: 1 | 2, size: number): Answer | null {
  const folder = mkdtempSync(path.join(os.tmpdir(), 'lollop-mesh-'));
  try {
    const begin = performance.now();
    writeFileSync(
      path.join(folder, 'bar.geo'),
      `SetFactory("Built-in");
Point(1) = {0, 0, 0, ${size}}; Point(2) = {0, 0.1, 0, ${size}}; Point(3) = {0, 0.1, 0.1, ${size}}; Point(4) = {0, 0, 0.1, ${size}};
Line(1) = {1, 2}; Line(2) = {2, 3}; Line(3) = {3, 4}; Line(4) = {4, 1};
Curve Loop(1) = {1, 2, 3, 4}; Plane Surface(1) = {1};
Extrude {1, 0, 0} { Surface{1}; }
Physical Volume("BAR") = {1};
`,
    );
    execFileSync('gmsh', ['-3', '-order', String(order), '-format', 'inp', '-o', 'mesh.inp', 'bar.geo'], {
      cwd: folder,
      stdio: 'ignore',
    });
    const mesh = readFileSync(path.join(folder, 'mesh.inp'), 'utf8');
    const { nodes, elements, text } = solidsOf(mesh);
    const held = nodes.filter(({ x }) => Math.abs(x) < 1e-9).map(({ id }) => id);
    const tips = nodes.filter(({ x, z }) => Math.abs(x - 1) < 1e-9 && (z < 1e-9 || z > 0.1 - 1e-9));
    writeFileSync(
      path.join(folder, 'job.inp'),
      `${text}*NSET, NSET=WALL\n${held.map((id) => `${id},`).join('\n')}\n*NSET, NSET=TIP\n${tips.map(({ id }) => `${id},`).join('\n')}
*MATERIAL, NAME=RUBBER\n*ELASTIC\n1e6, 0.3\n*DENSITY\n1000\n*SOLID SECTION, ELSET=BAR, MATERIAL=RUBBER
*STEP\n*STATIC\n*BOUNDARY\nWALL, 1, 3\n*DLOAD\nBAR, GRAV, ${SMALL_GRAVITY}, 0, 0, -1\n*NODE PRINT, NSET=TIP\nU\n*END STEP\n`,
    );
    execFileSync('ccx', ['job'], { cwd: folder, stdio: 'ignore' });
    const tip = meanTip(readFileSync(path.join(folder, 'job.dat'), 'utf8'));
    return {
      how: `${elements} ${order === 1 ? 'linear' : 'quadratic'} tetrahedra, meshed first`,
      seconds: round((performance.now() - begin) / 1000),
      errorPercent: round(100 * (tip / EXPECTED - 1)),
    };
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
    throw error;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** The nodes and tetrahedra of gmsh's file, without its points, lines and triangles. */
function solidsOf(mesh: string): { nodes: { id: number; x: number; z: number }[]; elements: number; text: string } {
  const nodes: { id: number; x: number; z: number }[] = [];
  const kept: string[] = [];
  let elements = 0;
  let mode: 'nodes' | 'solids' | 'other' = 'other';
  for (const line of mesh.split('\n')) {
    if (line.startsWith('*')) {
      mode = /^\*NODE/i.test(line) ? 'nodes' : /type=C3D/i.test(line) ? 'solids' : 'other';
      if (mode === 'nodes') kept.push('*NODE');
      if (mode === 'solids') kept.push(`${line.split(',').slice(0, 2).join(',')}, ELSET=BAR`);
      continue;
    }
    if (mode === 'other' || line.trim() === '') continue;
    kept.push(line);
    if (mode === 'nodes') {
      const [id, x, , z] = line.split(',').map(Number);
      nodes.push({ id: id!, x: x!, z: z! });
    } else if (!/^\s*$/.test(line)) {
      elements++;
    }
  }
  return { nodes, elements, text: `${kept.join('\n')}\n` };
}

/** Mean downward displacement of the printed nodes. */
function meanTip(dat: string): number {
  const rows = dat
    .split('\n')
    .map((line) => line.trim().split(/\s+/).map(Number))
    .filter((row) => row.length === 4 && row.every(Number.isFinite));
  return -rows.reduce((sum, row) => sum + row[3]!, 0) / rows.length;
}
