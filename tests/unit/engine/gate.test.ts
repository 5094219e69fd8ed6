import { describe, expect, it } from 'vitest'
import { cautionGroupOf, judgeGate, materialFamilyOf, readGatePolicy, type GateCheck, type GateDesign, type GateRequirement, type GateRung } from '#server/engine/gate'
import { aBook } from './factories'

const policy = readGatePolicy(aBook())

const requirement = (changes: Partial<GateRequirement> = {}): GateRequirement => ({
  couldHurt: false, coldestC: 5, hottestC: 40, strokes: 10_000, toleranceGrade: 2, surroundings: 'dry', ...changes,
})
const design = (changes: Partial<GateDesign> = {}): GateDesign => ({
  kind: 'compression', material: 'EN10270-1-SH', wireDiameterMm: 2.5, springIndex: 8, slenderness: 3, storedEnergyJ: 0, checks: [], ...changes,
})
const rung = (changes: Partial<GateRung> = {}): GateRung => ({ quantity: 500, netMinor: 48_000, currency: 'eur', dispatchOn: '2026-12-15', ...changes })
const check = (changes: Partial<GateCheck> = {}): GateCheck => ({ code: 'buckling', ok: false, severity: 'caution', message: 'It may buckle.', ...changes })

const judge = (
  { need = {}, found = {}, rungs = [{}] }: { need?: Partial<GateRequirement>, found?: Partial<GateDesign> | null, rungs?: Partial<GateRung>[] },
) => judgeGate(requirement(need), found === null ? null : design(found), rungs.map(rung), policy)
const codes = (input: Parameters<typeof judge>[0]) => judge(input).map((reason) => reason.code)

describe('the gate', () => {
  it('lets a usual spring through', () => expect(judge({})).toEqual([]))

  it('stops the index outside 5 to 12 and says by how much', () => {
    expect(codes({ found: { springIndex: 5 } })).toEqual([])
    expect(codes({ found: { springIndex: 12 } })).toEqual([])
    expect(judge({ found: { springIndex: 4.07 } })).toMatchObject([{ code: 'index', estimatorText: 'Index 4.1 is outside 5 to 12, where coiling is sure.' }])
    expect(judge({ found: { springIndex: 12.0004 } })[0]?.estimatorText).toContain('12.0004')
  })

  it('stops wire outside 0.3 to 8 mm', () => {
    expect(codes({ found: { wireDiameterMm: 0.3 } })).toEqual([])
    expect(codes({ found: { wireDiameterMm: 8 } })).toEqual([])
    expect(codes({ found: { wireDiameterMm: 0.28 } })).toEqual(['wire-range'])
    expect(codes({ found: { wireDiameterMm: 8.5 } })).toEqual(['wire-range'])
  })

  it('stops a slender spring', () => {
    expect(codes({ found: { slenderness: 4 } })).toEqual([])
    expect(codes({ found: { slenderness: 4.2 } })).toEqual(['slenderness'])
  })

  it('stops a spring with hooks or legs that holds much energy, not one held between its seats', () => {
    expect(codes({ found: { kind: 'extension', storedEnergyJ: 20 } })).toEqual([])
    expect(judge({ found: { kind: 'extension', storedEnergyJ: 20.4 } })).toMatchObject([
      { code: 'stored-energy', customerText: expect.stringContaining('if a hook gave way, it would fly'), estimatorText: expect.stringMatching(/^It holds 20\.4 J at its greatest load, over 20 J\./) },
    ])
    expect(judge({ found: { kind: 'torsion', storedEnergyJ: 35 } })[0]?.customerText).toContain('if a leg gave way')
    expect(codes({ found: { kind: 'compression', storedEnergyJ: 400 } })).toEqual([])
  })

  it('stops tolerance grade 1', () => {
    expect(codes({ need: { toleranceGrade: 1 } })).toEqual(['tolerance-grade'])
    expect(codes({ need: { toleranceGrade: 3 } })).toEqual([])
  })

  it('stops a life over ten million strokes', () => {
    expect(codes({ need: { strokes: 10_000_000 } })).toEqual([])
    expect(judge({ need: { strokes: 10_000_001 } })).toMatchObject([{ code: 'life', estimatorText: '10\u202F000\u202F001 strokes are over 10\u202F000\u202F000.' }])
  })

  it('stops too few and too many springs, whatever the other quantities', () => {
    expect(judge({ rungs: [{ quantity: 6 }, { quantity: 100 }] })).toMatchObject([{ code: 'quantity', estimatorText: '6 springs are under the least of 10.' }])
    expect(codes({ rungs: [{ quantity: 10 }, { quantity: 20_000 }] })).toEqual([])
    expect(codes({ rungs: [{ quantity: 20_001 }] })).toEqual(['quantity'])
    expect(judge({ rungs: [{ quantity: 1 }] })[0]?.estimatorText).toBe('1 spring is under the least of 10.')
  })

  it('stops an order over the value', () => {
    expect(codes({ rungs: [{ netMinor: 500_000 }] })).toEqual([])
    expect(judge({ rungs: [{}, { quantity: 1000, netMinor: 500_001 }] })).toMatchObject([
      { code: 'order-value', estimatorText: '€5\u202F000.01 for 1\u202F000 is over €5\u202F000.00.' },
    ])
  })

  it('stops materials, finishes and surroundings that need a person', () => {
    expect(codes({ found: { material: 'ASTM-B197' } })).toEqual(['material'])
    expect(codes({ found: { material: 'nobody-knows' } })).toEqual(['material'])
    expect(codes({ need: { finish: 'oiled' } })).toEqual([])
    expect(codes({ need: { finish: 'zinc-flake' } })).toEqual(['finish'])
    expect(codes({ need: { surroundings: 'damp' } })).toEqual([])
    for (const surroundings of ['salt', 'food', 'chemical']) expect(codes({ need: { surroundings } })).toEqual(['surroundings'])
  })

  it('stops temperatures beyond -20 to 80', () => {
    expect(codes({ need: { coldestC: -20, hottestC: 80 } })).toEqual([])
    expect(codes({ need: { coldestC: -21 } })).toEqual(['temperature'])
    expect(codes({ need: { hottestC: 81 } })).toEqual(['temperature'])
  })

  it('stops where a break could hurt someone, before anything else', () => {
    const reasons = judge({ need: { couldHurt: true, toleranceGrade: 1 }, found: { springIndex: 4 } })
    expect(reasons.map((reason) => reason.code)).toEqual(['could-hurt', 'index', 'tolerance-grade'])
    expect(reasons[0]?.customerText).toContain('qualified engineer')
  })

  it('stops where nothing fits, and still judges the rest', () => {
    expect(codes({ found: null, need: { hottestC: 200 }, rungs: [] })).toEqual(['nothing-fits', 'temperature'])
  })

  it('stops failed checks and cautions that need a person, not those the cheapest spring always has', () => {
    expect(codes({ found: { checks: [check({ severity: 'stop', code: 'bore' })] } })).toEqual(['check-failed'])
    for (const code of ['buckling', 'resonance', 'fatigue', 'coils', 'temperature', 'initial-tension', 'hook-bend', 'winding', 'a-new-check']) {
      expect(codes({ found: { checks: [check({ code })] } }), code).toEqual(['caution'])
    }
    for (const code of ['clearance', 'stress-solid', 'stress-working', 'stress-hook-bending', 'stress-hook-torsion', 'bore', 'rod', 'wire-range']) {
      expect(codes({ found: { checks: [check({ code })] } }), code).toEqual([])
    }
    expect(codes({ found: { checks: [check({ ok: true }), check({ severity: 'note' })] } })).toEqual([])
  })

  it('stops a date nobody can keep, and only where no quantity meets it', () => {
    expect(codes({ need: { neededOn: '2026-12-15' } })).toEqual([])
    expect(judge({ need: { neededOn: '2026-12-04' } })).toMatchObject([
      { code: 'needed-on', estimatorText: 'Needed by 4 Dec 2026; the plan gives 15 Dec 2026 at the earliest.' },
    ])
    expect(codes({ need: { neededOn: '2026-12-04' }, rungs: [{ dispatchOn: '2026-12-20' }, { quantity: 100, dispatchOn: '2026-12-04' }] })).toEqual([])
    expect(codes({ need: { neededOn: '2026-12-04' }, rungs: [{ dispatchOn: null }] })).toEqual(['needed-on'])
  })

  it('takes its limits from the book', () => {
    const strict = readGatePolicy(aBook({ 'gate.index-min': '6', 'gate.material.carbon-steel': '0', 'gate.caution.fit': '0', 'gate.value-max': '100' }))
    const reasons = judgeGate(requirement(), design({ springIndex: 5.5, checks: [check({ code: 'rod' })] }), [rung()], strict)
    expect(reasons.map((reason) => reason.code)).toEqual(['index', 'material', 'caution', 'order-value'])
    const careful = readGatePolicy(aBook({ 'gate.caution.hook': '0', 'gate.energy-max-j': '2' }))
    const hooked = design({ kind: 'extension', storedEnergyJ: 3, checks: [check({ code: 'stress-hook-bending' })] })
    expect(judgeGate(requirement(), hooked, [rung()], careful).map(({ code }) => code)).toEqual(['stored-energy', 'caution'])
  })

  it('has no room for free text', () => {
    expect(judgeGate({ ...requirement(), remarks: 'brake, lifting, children' } as GateRequirement, design(), [rung()], policy)).toEqual([])
  })

  it('gives both sides a sentence', () => {
    const reasons = judge({
      need: { couldHurt: true, toleranceGrade: 1, strokes: 1e9, hottestC: 300, surroundings: 'salt', finish: 'zinc', neededOn: '2020-01-01' },
      found: { kind: 'torsion', springIndex: 3, wireDiameterMm: 0.1, slenderness: 9, storedEnergyJ: 90, material: 'x', checks: [check(), check({ severity: 'stop' })] },
      rungs: [{ quantity: 1, netMinor: 9_000_000 }, { quantity: 1e6 }],
    })
    expect(reasons).toHaveLength(17)
    for (const reason of reasons) {
      expect(reason.customerText).toMatch(/^[A-Z].*\.$/)
      expect(reason.estimatorText).toMatch(/\.$/)
    }
  })
})

describe('families of material', () => {
  it('knows the wires of the table', () => {
    expect(['EN10270-1-SM', 'ASTM-A227', 'ASTM-A228'].map(materialFamilyOf)).toEqual(Array(3).fill('carbon-steel'))
    expect(['EN10270-2-FDSiCr', 'ASTM-A229', 'ASTM-A232', 'ASTM-A401'].map(materialFamilyOf)).toEqual(Array(4).fill('oil-tempered'))
    expect(['EN10270-3-1.4310', 'ASTM-A313-302'].map(materialFamilyOf)).toEqual(['stainless', 'stainless'])
    expect(['ASTM-B159', 'ASTM-B197', ''].map(materialFamilyOf)).toEqual(['copper-alloy', 'copper-alloy', 'other'])
    expect(cautionGroupOf('never-heard-of')).toBe('other')
  })
})
