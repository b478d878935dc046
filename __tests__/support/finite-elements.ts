import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';

/**
 * A general-purpose finite-element program as a test oracle: gmsh makes second-order tetrahedra of an exact solid,
 * CalculiX solves them with linear elasticity. Debian packages gmsh and calculix-ccx.
 */
const runs = (command: string, args: string[]) => spawnSync(command, args, { stdio: 'ignore' }).error === undefined;

/** Null when both programs are here, otherwise what to do. */
export const finiteElementsMissing = (): string | null =>
  runs('gmsh', ['-version']) && runs('ccx', ['-v'])
    ? null
    : 'gmsh and ccx are not here: `apt-get install gmsh calculix-ccx` brings them. The cross-check was left out.';

export interface FiniteElementProblem {
  /** gmsh script with the OpenCASCADE kernel; it must name the held surfaces "HELD" and the volume "BODY" */
  script: string;
  /** m */
  elementSize: number;
  youngsModulus: number;
  poissonsRatio: number;
  density: number;
  gravity: readonly [number, number, number];
}

export interface FiniteElementAnswer {
  elements: number;
  /** 3 a node, m */
  places: Float64Array;
  displacements: Float64Array;
}

export function solveFiniteElements(problem: FiniteElementProblem): FiniteElementAnswer {
  const folder = mkdtempSync(path.join(tmpdir(), 'lollop-elements-'));
  try {
    const { elementSize: size } = problem;
    writeFileSync(
      path.join(folder, 'solid.geo'),
      `SetFactory("OpenCASCADE");\nMesh.MeshSizeMin = ${size};\nMesh.MeshSizeMax = ${size};\nMesh.ElementOrder = 2;\nMesh.HighOrderOptimize = 1;\nMesh.SaveGroupsOfNodes = 1;\n${problem.script}\n`,
    );
    run(folder, 'gmsh', ['-3', 'solid.geo', '-o', 'mesh.inp', '-format', 'inp', '-v', '1', '-nt', '1']);
    const mesh = readMesh(readFileSync(path.join(folder, 'mesh.inp'), 'utf8'));
    writeFileSync(path.join(folder, 'deck.inp'), deck(mesh, problem));
    run(folder, 'ccx', ['-i', 'deck']);
    return answer(mesh, readFileSync(path.join(folder, 'deck.dat'), 'utf8'));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

function run(cwd: string, command: string, args: string[]): void {
  const { status, stdout, stderr } = spawnSync(command, args, {
    cwd,
    encoding: 'utf8',
    env: { ...process.env, OMP_NUM_THREADS: '1' },
  });
  if (status !== 0) throw new Error(`${command} failed (${status}):\n${stdout}\n${stderr}`);
}

interface Mesh {
  nodes: Map<number, string>;
  elements: string[];
  held: string[];
}

/** The blocks of gmsh's file that matter: nodes, ten-node tetrahedra, and the nodes of the group HELD. */
function readMesh(text: string): Mesh {
  const mesh: Mesh = { nodes: new Map(), elements: [], held: [] };
  let block = '';
  for (const line of text.split('\n')) {
    if (line.startsWith('*')) block = line.toUpperCase().replace(/\s/g, '');
    else if (line.trim() === '') continue;
    else if (block.startsWith('*NODE')) {
      const comma = line.indexOf(',');
      mesh.nodes.set(Number(line.slice(0, comma)), line.slice(comma + 1));
    } else if (block.startsWith('*ELEMENT') && block.includes('C3D10')) mesh.elements.push(line.trim());
    else if (block.startsWith('*NSET') && block.includes('HELD'))
      mesh.held.push(...line.split(',').map((n) => n.trim()).filter(Boolean)); // prettier-ignore
  }
  if (mesh.elements.length === 0 || mesh.held.length === 0)
    throw new Error('gmsh gave no tetrahedra or no held nodes.');
  return mesh;
}

function deck({ nodes, elements, held }: Mesh, problem: FiniteElementProblem): string {
  // An element's line may go on over two lines, which end in a comma.
  const used = new Set(elements.join(' ').split(/[,\s]+/).map(Number)); // prettier-ignore
  const g = Math.hypot(...problem.gravity);
  return [
    '*NODE, NSET=ALL',
    ...[...nodes].filter(([n]) => used.has(n)).map(([n, place]) => `${n},${place}`),
    '*ELEMENT, TYPE=C3D10, ELSET=BODY',
    ...elements,
    '*NSET, NSET=HELD',
    ...held.map((n) => `${n},`),
    '*MATERIAL, NAME=SOFT',
    '*ELASTIC',
    `${problem.youngsModulus}, ${problem.poissonsRatio}`,
    '*DENSITY',
    `${problem.density}`,
    '*SOLID SECTION, ELSET=BODY, MATERIAL=SOFT',
    '*BOUNDARY',
    'HELD, 1, 3',
    '*STEP',
    '*STATIC',
    '*DLOAD',
    `BODY, GRAV, ${g}, ${problem.gravity.map((x) => x / g).join(', ')}`,
    '*NODE PRINT, NSET=ALL',
    'U',
    '*END STEP',
    '',
  ].join('\n');
}

function answer({ nodes, elements }: Mesh, printed: string): FiniteElementAnswer {
  const places: number[] = [];
  const displacements: number[] = [];
  for (const line of printed.split('\n')) {
    const [n, ...u] = line.trim().split(/\s+/).map(Number);
    const place = nodes.get(n!);
    if (place === undefined || u.length !== 3 || u.some(Number.isNaN)) continue;
    places.push(...place.split(',').map(Number));
    displacements.push(...u);
  }
  if (places.length === 0) throw new Error('ccx printed no displacements.');
  return {
    elements: elements.length,
    places: Float64Array.from(places),
    displacements: Float64Array.from(displacements),
  };
}
