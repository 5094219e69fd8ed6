import { describe, expect, it } from 'vitest'
import { requirementSchema, type RequirementInput } from '#shared/schemas/enquiry'
import type { OperationKind } from '#shared/schemas/shop'
import { evaluateSpring } from '#shared/spring/mechanics/evaluate-spring'
import { checkSizeRequirement } from '#shared/spring/sizing'
import { toSheet } from '#server/services/bench/sheet'
import { cautionsFor } from '#server/services/bench/cautions'
import { usageNotesOf } from '#server/services/quotes/notes'
import { allowedMaterialsFor } from '#server/services/springs/allowed-materials'
import { handOf, sizeRequestOf, workingPointsOf } from '#server/services/springs/requirement'
import { pricedDesignOf, springWordsOf, storedEnergyOf } from '#server/services/springs/stored-design'
import { isUsualSpring } from '#server/services/springs/usual-spring'
import { materialFamilyOf, readGatePolicy } from '#server/engine/gate'
import { buildRouting } from '#server/engine/planning'
import { renderMail } from '../../../emails/render'
import { previewQuote } from '../../../emails/parts/preview'
import { aBook } from '../engine/factories'
import { keptDesign, NEEDS } from './kinds'

const request = (need: RequirementInput) => sizeRequestOf(requirementSchema.parse(need), 3)

describe('a requirement as the search takes it', () => {
  it('has hooks of an extension spring, legs and the way of loading of a torsion spring, and steps of a coiler', () => {
    expect(request({ ...NEEDS.extension, hook: 'half-loop', maxFreeLengthMm: 55, hottestC: 80 })).toMatchObject({
      kind: 'extension', hook: { form: 'half-loop' }, fit: { boreMm: 20, maxFreeLengthMm: 55 }, points: [{ lengthMm: 60, forceN: 20 }, { lengthMm: 90, forceN: 60 }], coilStep: 0.25, diameterStepMm: 0.1, limit: 3, temperatureC: 80,
    })
    expect(request({ ...NEEDS.torsion, legForm: 'straight', load: 'opens' })).toMatchObject({
      kind: 'torsion', legs: [{ lengthMm: 25, form: 'straight' }, { lengthMm: 30, form: 'straight' }], loadOpens: true, points: [{ angleDeg: 20, momentNmm: 300 }, { angleDeg: 110, momentNmm: 900 }],
    })
  })

  it.each<[string, RequirementInput, object]>([
    ['a load and a rate', { ...NEEDS.extension, need: { knows: 'load-and-rate', load: { forceN: 40, lengthMm: 110 }, rateNPerMm: 0.8 } }, { points: [{ lengthMm: 110, forceN: 40 }], rateNPerMm: 0.8, freeLengthMm: undefined }],
    ['a load and a free length', { ...NEEDS.extension, need: { knows: 'load-and-length', load: { forceN: 50, lengthMm: 100 }, freeLengthMm: 60 } }, { points: [{ lengthMm: 100, forceN: 50 }], rateNPerMm: undefined, freeLengthMm: 60 }],
    ['a moment and a rate', { ...NEEDS.torsion, need: { knows: 'moment-and-rate', load: { momentNmm: 900, angleDeg: 60 }, rateNmmPerDeg: 7 } }, { points: [{ angleDeg: 60, momentNmm: 900 }], rateNmmPerDeg: 7 }],
    ['a moment from free', { ...NEEDS.torsion, need: { knows: 'moment-from-free', load: { momentNmm: 900, angleDeg: 60 } } }, { points: [{ angleDeg: 60, momentNmm: 900 }], rateNmmPerDeg: undefined }],
    // 2 N/mm from 50 mm to 30 mm.
    ['a rate and lengths', { ...NEEDS.compression, need: { knows: 'rate-and-length', rateNPerMm: 2, freeLengthMm: 50, shortestLengthMm: 30 } }, { points: [{ lengthMm: 30, forceN: 40 }], freeLengthMm: 50 }],
  ])('says %s in full', (_, need, asked) => {
    expect(request(need)).toMatchObject(asked)
    expect(checkSizeRequirement(request(need))).toEqual([])
    expect(workingPointsOf(requirementSchema.parse(need))).toEqual(request(need).points)
  })

  it('is coiled right-hand unless the customer says left', () => {
    expect((['left', 'right', 'either'] as const).map(hand => handOf({ hand }))).toEqual(['left', 'right', 'right'])
  })
})

describe.each(['compression', 'extension', 'torsion'] as const)('a kept %s spring', (kind) => {
  const design = keptDesign({ ...NEEDS[kind], hand: 'left' })

  it('carries the whole spring it was judged by', () => {
    expect(design).toMatchObject({ kind, hand: 'left', spring: { kind, hand: 'left', material: 'EN10270-1-SM' }, evaluation: { kind } })
    const again = evaluateSpring(design.spring)
    expect([again.massG, again.points, again.tolerances]).toEqual([design.evaluation.massG, design.evaluation.points, design.evaluation.tolerances])
  })

  it('is priced and routed by its kind', () => {
    const priced = pricedDesignOf(design)
    expect([priced.kind, priced.ends, priced.formed]).toEqual(kind === 'compression' ? [kind, 'closed-ground', null] : [kind, null, kind === 'extension' ? 'full-loop' : 'tangential'])
    expect([priced.wireLengthMm, priced.massG]).toEqual([design.evaluation.wireLengthMm, design.evaluation.massG])
    const minutes = { setUpMinutes: 1, runMinutes: 1 }
    const steps = buildRouting(priced, 100, { 'coiling': minutes, 'stress-relief': minutes, 'end-grinding': minutes, 'inspection': minutes, 'packing': minutes }).map(step => step.kind)
    expect(steps).toEqual(kind === 'compression' ? ['coiling', 'stress-relief', 'end-grinding', 'inspection', 'packing'] : ['coiling', 'stress-relief', 'inspection', 'packing'])
  })

  it('is said in a line, which its mail carries', async () => {
    const words = springWordsOf(design)
    expect(words).toMatch({ compression: /^2\.5 mm wire \(.*\), [\d.]+ mm across, [\d.]+ mm long$/, extension: /^1\.6 mm wire .* mm long inside its hooks$/, torsion: /^2 mm wire .* mm long in the body$/ }[kind])
    const mail = await renderMail('quote-ready', { ...previewQuote, springWords: words }, { linkUrl: 'https://oxmere.example/x', timeZone: 'Europe/Dublin' })
    for (const part of [mail.text, mail.html]) expect(part).toContain(words)
  })

  it('tells its customer how far it may go and how it stores energy, calmly', () => {
    const notes = usageNotesOf(design, { hottestC: 40, couldHurt: 'no', surroundings: 'dry' })
    expect(notes[0]).toMatch({ compression: /^Pressed shorter than [\d.]+ mm/, extension: /^Never pull it beyond [\d.]+ mm inside the hooks/, torsion: /^Turn it the way that winds it up only, and never more than [\d.]+ degrees/ }[kind])
    for (const note of notes) {
      expect(note).toMatch(/^[A-Z].*\.$/)
      expect(note).not.toMatch(/!|undefined|NaN|null/)
    }
    if (kind !== 'compression') expect(notes.join(' ')).toMatch(/stores energy/)
    expect(usageNotesOf(design, { hottestC: 40, couldHurt: 'yes-or-unsure', surroundings: 'dry' }).at(-1)).toMatch(/qualified engineer/)
  })

  it('has its own set-up values at the bench, and cautions of its kind at every centre', () => {
    const sheet = toSheet(design, 3.2)
    expect(sheet).toMatchObject({ kind, totalCoils: design.totalCoils, wireLengthMm: design.evaluation.wireLengthMm, hand: 'left', wirePlannedKg: 3.2, spring: design.spring })
    expect('pitchMm' in sheet).toBe(kind === 'compression')
    expect('initialTensionN' in sheet).toBe(kind === 'extension')
    expect('legs' in sheet).toBe(kind === 'torsion')
    const words = (['coiling', 'stress-relief', 'inspection', 'packing'] as const).map(centre => cautionsFor([centre], design))
    for (const lines of words) expect(lines.at(-1)).toMatch(/rules of this shop/)
    const whole = cautionsFor(['coiling', 'stress-relief', 'inspection', 'packing'], design)
    expect(new Set(whole).size).toBe(whole.length)
    expect(whole.at(-1)).toMatch(/rules of this shop/)
    expect(words[2]!.join(' ')).toMatch({ compression: /pressed spring/, extension: /flies when a hook slips/, torsion: /whips back when a leg slips/ }[kind])
  })
})

describe('the limits of a kept spring', () => {
  it('go at most where the stress is allowed: the notes round down, never up', () => {
    const [extension, torsion] = [keptDesign(NEEDS.extension), keptDesign(NEEDS.torsion)]
    if (extension.kind !== 'extension' || torsion.kind !== 'torsion') throw new Error('other kinds')
    const first = (design: typeof extension | typeof torsion) => Number(/([\d.]+) (?:mm inside|degrees)/.exec(usageNotesOf(design, { hottestC: 40, couldHurt: 'no', surroundings: 'dry' })[0]!)![1])
    expect(first(extension)).toBeLessThanOrEqual(extension.evaluation.greatestLengthMm!)
    expect(first(extension)).toBeGreaterThan(extension.evaluation.greatestLengthMm! - 0.1001)
    expect(first(torsion)).toBeLessThanOrEqual(torsion.evaluation.greatestAngleDeg!)
  })

  it('names a rod only where none was asked for', () => {
    const notes = (need: RequirementInput, wireDiameterMm?: number) => usageNotesOf(keptDesign(need, 'EN10270-1-SH', wireDiameterMm), { hottestC: 40, couldHurt: 'no', surroundings: 'dry' }).join(' ')
    expect(notes(NEEDS.torsion)).toContain('It clears a rod of 8 mm')
    const { rodMm: _, ...withoutRod } = NEEDS.torsion
    expect(notes(withoutRod)).toMatch(/A rod through it may be [\d.]+ mm thick at most/)
    expect(notes({ ...withoutRod, load: 'opens' }, 2.5)).toContain('the way that opens it, as asked for')
  })

  it('hold the energy under their load line', () => {
    const [compression, extension, torsion] = [keptDesign(NEEDS.compression), keptDesign(NEEDS.extension), keptDesign(NEEDS.torsion)]
    if (compression.kind !== 'compression' || extension.kind !== 'extension' || torsion.kind !== 'torsion') throw new Error('other kinds')
    // Force times way, summed over thin slices of the way by the rate alone.
    const summed = (start: number, rate: number, way: number) => Array.from({ length: 1000 }, (_, i) => (start + rate * way * (i + 0.5) / 1000) * way / 1000).reduce((a, b) => a + b) / 1000
    expect(storedEnergyOf(compression)).toBeCloseTo(summed(0, compression.evaluation.rateNPerMm, compression.freeLengthMm - 35), 6)
    expect(storedEnergyOf(extension)).toBeCloseTo(summed(extension.evaluation.initialTensionN, extension.evaluation.rateNPerMm, 90 - extension.freeLengthMm), 6)
    const last = torsion.evaluation.points.at(-1)!
    expect(storedEnergyOf(torsion)).toBeCloseTo(summed(0, torsion.evaluation.rateNmmPerDeg * 180 / Math.PI, last.angleDeg * Math.PI / 180), 6)
    expect(storedEnergyOf({ evaluation: { ...torsion.evaluation, points: [] } })).toBe(0)
  })
})

describe('materials', () => {
  it('are any where it is dry, those that do not rust elsewhere, and the one that is named', () => {
    expect(allowedMaterialsFor({ material: 'any', surroundings: 'dry' })).toMatchObject({ rule: null, materials: expect.arrayContaining(['EN10270-1-SH', 'ASTM-B159']) })
    const damp = allowedMaterialsFor({ material: 'any', surroundings: 'damp' })
    expect(damp.materials).toEqual(expect.arrayContaining(['ASTM-A313-302', 'ASTM-B159', 'ASTM-B197', 'EN10270-3-1.4310']))
    expect(damp.materials.filter(code => ['carbon-steel', 'oil-tempered', 'other'].includes(materialFamilyOf(code)))).toEqual([])
    expect(damp.rule).toMatch(/does not rust/)
    expect(allowedMaterialsFor({ material: 'ASTM-B197', surroundings: 'salt' })).toEqual({ materials: ['ASTM-B197'], rule: null })
  })

  it('of beryllium warn of their dust wherever it may rise', () => {
    const care = (centre: OperationKind, material: 'ASTM-B197' | 'ASTM-B159') => cautionsFor([centre], { kind: 'torsion', material }).join(' ')
    expect(care('coiling', 'ASTM-B197')).toMatch(/dust harms the lungs/)
    expect(care('end-grinding', 'ASTM-B197')).toMatch(/never grind it dry/)
    expect(care('stress-relief', 'ASTM-B197')).toMatch(/hold it on its fixture/)
    expect(care('end-grinding', 'ASTM-B159')).not.toMatch(/Beryllium/)
    expect(cautionsFor(['inspection'], null).join(' ')).not.toMatch(/hook|leg/)
  })
})

describe('a usual spring', () => {
  const policy = readGatePolicy(aBook())
  const wire = { id: 'w', material: 'EN10270-1-SM', wireDiameterMm: 2 } as const
  const candidate = { wire, meanDiameterMm: 16, activeCoils: 8, totalCoils: 10, freeLengthMm: 50, wireLengthMm: 500, massG: 12, outerDiameterMm: 18 }
  it('has index, wire and enough coils, whatever the kind', () => {
    for (const kind of ['compression', 'torsion'] as const) {
      expect(isUsualSpring(candidate, { kind }, policy)).toBe(true)
      expect(isUsualSpring({ ...candidate, meanDiameterMm: 9.8 }, { kind }, policy)).toBe(false)
      expect(isUsualSpring({ ...candidate, wire: { ...wire, wireDiameterMm: 8.5 }, meanDiameterMm: 68 }, { kind }, policy)).toBe(false)
      expect(isUsualSpring({ ...candidate, activeCoils: 2.5, totalCoils: 3.5 }, { kind }, policy)).toBe(false)
    }
  })
  it('is not slender where it is pressed, however long its body elsewhere', () => {
    expect(isUsualSpring({ ...candidate, freeLengthMm: 65 }, { kind: 'compression' }, policy)).toBe(false)
    expect(isUsualSpring({ ...candidate, freeLengthMm: 65 }, { kind: 'torsion' }, policy)).toBe(true)
  })
  it('has an initial tension that winding gives with ease where it is pulled', () => {
    // Index 8: 231/exp(0.84) - 6.9 (4 - 5/6.5) = 77.43 MPa at the least (Shigley, from memory); pi d^3/(8 D) of it, 0.19635 mm2, is 15.2 N.
    expect(isUsualSpring({ ...candidate, initialTensionN: 15.3 }, { kind: 'extension' }, policy)).toBe(true)
    expect(isUsualSpring({ ...candidate, initialTensionN: 15.1 }, { kind: 'extension' }, policy)).toBe(false)
    expect(isUsualSpring(candidate, { kind: 'extension' }, policy)).toBe(false)
  })
})
