import { spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

/*
 * Beam models for CalculiX (program `ccx`, Debian package calculix-ccx), three-node B32R elements. Its circular section
 * data are diameters. Node numbers: the chain is 1, 2, 3 ...; arms come after it.
 */
export interface BeamMaterial {
  readonly youngsModulusMpa: number
  readonly shearModulusMpa: number
}

interface Point { readonly x: number, readonly y: number, readonly z: number }

/** Runs a model and returns the displacement printed for the node set OUT: three translations or rotations. */
function runCalculix(model: string): readonly [number, number, number] {
  const folder = mkdtempSync(join(tmpdir(), 'wirewright-ccx-'))
  try {
    writeFileSync(join(folder, 'model.inp'), model)
    const run = spawnSync('ccx', ['-i', 'model'], { cwd: folder, encoding: 'utf8', timeout: 100_000, env: { ...process.env, OMP_NUM_THREADS: '1' } })
    if (run.error) throw new Error(`ccx did not run: install the Debian package calculix-ccx (${run.error.message})`)
    if (run.status !== 0) throw new Error(`ccx ended with ${String(run.status)}: ${run.stdout.slice(-500)}`)
    return readDisplacement(readFileSync(join(folder, 'model.dat'), 'utf8'))
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

function readDisplacement(text: string): readonly [number, number, number] {
  const line = text.split('\n').map(row => row.trim().split(/\s+/)).find(cells => cells.length === 4 && /^\d+$/.test(cells[0] ?? ''))
  const [x, y, z] = (line ?? []).slice(1).map(Number)
  if (x === undefined || y === undefined || z === undefined || [x, y, z].some(Number.isNaN)) throw new Error(`ccx printed no displacement:\n${text.slice(0, 500)}`)
  return [x, y, z]
}

const nodeLines = (points: readonly Point[], first: number) =>
  points.map((p, i) => `${first + i}, ${p.x.toPrecision(12)}, ${p.y.toPrecision(12)}, ${p.z.toPrecision(12)}`).join('\n')

function chainElements(firstElement: number, nodes: number, firstNode: number): string {
  const lines: string[] = []
  for (let i = 0; i + 2 < nodes; i += 2) lines.push(`${firstElement + i / 2}, ${firstNode + i}, ${firstNode + i + 1}, ${firstNode + i + 2}`)
  return lines.join('\n')
}

function materialLines(name: string, { youngsModulusMpa, shearModulusMpa }: BeamMaterial, stiffer = 1): string {
  const poisson = youngsModulusMpa / (2 * shearModulusMpa) - 1
  return `*MATERIAL, NAME=${name}\n*ELASTIC\n${youngsModulusMpa * stiffer}, ${poisson}`
}

// The wire, and arms of the same section so stiff that they add nothing.
function sections(wireDiameterMm: number, material: BeamMaterial): string {
  const section = (set: string, name: string) => `*BEAM SECTION, ELSET=${set}, MATERIAL=${name}, SECTION=CIRC\n${wireDiameterMm}, ${wireDiameterMm}\n0, 0, 1`
  return [materialLines('STEEL', material), materialLines('STIFF', material, 1e4), section('WIRE', 'STEEL'), section('ARMS', 'STIFF')].join('\n')
}

/**
 * Twist of a straight round bar over the twist of theory, T L/(G pi d^4/32): the element's own error. The torque is a couple
 * on two stiff arms across the end, and the twist is read at the tip of one.
 */
export function torsionCalibration(wireDiameterMm: number, material: BeamMaterial): number {
  const d = wireDiameterMm
  const reach = 5 * d
  // As with the helix, two lengths are compared, so that the joints of bar and arms cancel.
  const twistOf = (length: number) => {
    const nodes = 2 * Math.round((2 * length) / d) + 1
    const points = Array.from({ length: nodes }, (_, i) => ({ x: (length * i) / (nodes - 1), y: 0, z: 0 }))
    const arms = [0.5, 1, -0.5, -1].map(share => ({ x: length, y: share * reach, z: 0 }))
    const [leftTip, rightTip] = [nodes + 2, nodes + 4]
    const [, , lift] = runCalculix(`*NODE, NSET=ALL
${nodeLines(points, 1)}
${nodeLines(arms, nodes + 1)}
*NSET, NSET=OUT
${leftTip}
*ELEMENT, TYPE=B32R, ELSET=WIRE
${chainElements(1, nodes, 1)}
*ELEMENT, TYPE=B32R, ELSET=ARMS
${nodes + 1}, ${nodes}, ${nodes + 1}, ${leftTip}
${nodes + 2}, ${nodes}, ${nodes + 3}, ${rightTip}
${sections(d, material)}
*BOUNDARY
1, 1, 6
*STEP
*STATIC
*CLOAD
${leftTip}, 3, 1
${rightTip}, 3, -1
*NODE PRINT, NSET=OUT
U
*END STEP
`)
    return lift / reach
  }
  const theory = (2 * reach * 20 * d) / (material.shearModulusMpa * (Math.PI * d ** 4) / 32)
  return (twistOf(40 * d) - twistOf(20 * d)) / theory
}

/**
 * Axial rate of one coil of a helix, N/mm: seats kept parallel, free to turn about the axis, loaded on it through stiff
 * arms. Two helices are compared, so that the joints of wire and arms (about a twentieth of a coil) cancel.
 */
export function rateOfOneCoil(input: Omit<HelixInput, 'coils'>): number {
  const [few, many] = [4, 8]
  return (many - few) / (1 / helixRate({ ...input, coils: many }) - 1 / helixRate({ ...input, coils: few }))
}

interface HelixInput {
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly coils: number
  readonly pitchMm: number
  readonly material: BeamMaterial
  readonly elementsPerTurn: number
}

function helixRate(input: HelixInput): number {
  const { wireDiameterMm: d, meanDiameterMm: D, coils: n, pitchMm: p } = input
  const nodes = 2 * Math.round(n * input.elementsPerTurn) + 1
  const points = Array.from({ length: nodes }, (_, i) => {
    const turns = (n * i) / (nodes - 1)
    return { x: (D / 2) * Math.cos(2 * Math.PI * turns), y: (D / 2) * Math.sin(2 * Math.PI * turns), z: p * turns }
  })
  const first = points[0]
  const last = points[nodes - 1]
  if (!first || !last) throw new Error('A helix needs nodes')
  // Each arm: middle node, then the node on the axis.
  const arms = [first, last].flatMap(end => [{ x: end.x / 2, y: end.y / 2, z: end.z }, { x: 0, y: 0, z: end.z }])
  const [bottomMiddle, bottom, topMiddle, top] = [nodes + 1, nodes + 2, nodes + 3, nodes + 4]
  const force = 1
  const [, , lift] = runCalculix(`*NODE, NSET=ALL
${nodeLines(points, 1)}
${nodeLines(arms, nodes + 1)}
*NSET, NSET=OUT
${top}
*ELEMENT, TYPE=B32R, ELSET=WIRE
${chainElements(1, nodes, 1)}
*ELEMENT, TYPE=B32R, ELSET=ARMS
${nodes + 1}, 1, ${bottomMiddle}, ${bottom}
${nodes + 2}, ${nodes}, ${topMiddle}, ${top}
${sections(d, input.material)}
*BOUNDARY
${bottom}, 1, 6
${top}, 1, 2
${top}, 4, 5
*STEP
*STATIC
*CLOAD
${top}, 3, ${force}
*NODE PRINT, NSET=OUT
U
*END STEP
`)
  return force / lift
}
