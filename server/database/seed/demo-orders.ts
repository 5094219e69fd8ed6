import type { EnquiryInput, RequirementInput } from '../../../shared/schemas/enquiry'

/** How far an invented order has come. */
export type DemoStage = 'enquiry' | 'quoted' | 'deposit-paid' | 'planned' | 'in-work' | 'finished' | 'settled'

/** `customer` is one of the demo people's addresses; `hoursAgo` is when the order form was sent. */
export type DemoOrder = {
  stage: DemoStage, hoursAgo: number, quantity: number, paceFactor: number, customer: string, enquiry: EnquiryInput,
  /** Of a job in work: operations that are finished; the next one runs. One unless told, since a work centre does one thing at a time. */
  finishedOperations?: number,
}

const TARNBECK = { email: 'ilse.varrow@tarnbeck.example', name: 'Ilse Varrow', firm: 'Tarnbeck Valve Co.', countryCode: 'IE' } as const
const HESSARY = { email: 'joost.hale@hessary.example', name: 'Joost Hale', firm: 'Hessary Looms', countryCode: 'BE', vatNumber: 'BE0999999922' } as const

const usual = { kind: 'compression', couldHurt: 'no', quantities: [100, 250, 500, 1000, 2000] } as const satisfies Partial<RequirementInput>
const pulled = { ...usual, kind: 'extension' } as const
const turned = { ...usual, kind: 'torsion' } as const

/** Invented orders, so that every place of the shop has something in it. Oldest first: numbers follow from the order. */
export const DEMO_ORDERS: readonly DemoOrder[] = [
  {
    stage: 'settled', hoursAgo: 24 * 20, quantity: 500, paceFactor: 1.12, customer: HESSARY.email,
    enquiry: {
      contact: { ...HESSARY, title: 'Warp tension spring', remarks: 'As the ones we had before, but ground, please.' },
      requirement: { ...usual, need: { knows: 'two-loads', first: { forceN: 40, lengthMm: 60 }, second: { forceN: 120, lengthMm: 40 } }, boreMm: 26, maxFreeLengthMm: 75 },
    },
  },
  {
    stage: 'settled', hoursAgo: 24 * 17, quantity: 500, paceFactor: 1.08, customer: TARNBECK.email,
    enquiry: {
      contact: { ...TARNBECK, title: 'Float arm return', remarks: 'Two on each valve.' },
      requirement: { ...pulled, need: { knows: 'two-loads', first: { forceN: 20, lengthMm: 60 }, second: { forceN: 60, lengthMm: 90 } }, boreMm: 20 },
    },
  },
  {
    stage: 'finished', hoursAgo: 24 * 13, quantity: 250, paceFactor: 0.94, customer: TARNBECK.email,
    enquiry: {
      contact: { ...TARNBECK, title: 'Check valve spring', remarks: '' },
      requirement: { ...usual, need: { knows: 'load-and-rate', load: { forceN: 25, lengthMm: 30 }, rateNPerMm: 2.2 }, boreMm: 18, certificate: true },
    },
  },
  {
    stage: 'finished', hoursAgo: 24 * 11, quantity: 250, paceFactor: 0.97, customer: HESSARY.email,
    enquiry: {
      contact: { ...HESSARY, title: 'Pattern drum pawl', remarks: 'Works on a pin of 8 mm.' },
      requirement: { ...turned, need: { knows: 'two-moments', first: { momentNmm: 300, angleDeg: 20 }, second: { momentNmm: 900, angleDeg: 110 } }, firstLegMm: 25, secondLegMm: 25, rodMm: 8, certificate: true },
    },
  },
  {
    stage: 'in-work', hoursAgo: 56, quantity: 500, paceFactor: 1.02, customer: HESSARY.email,
    finishedOperations: 2,
    enquiry: {
      contact: { ...HESSARY, title: 'Harness return', remarks: 'Hooks over a pin of 4 mm.' },
      requirement: { ...pulled, need: { knows: 'load-and-length', load: { forceN: 50, lengthMm: 100 }, freeLengthMm: 60 } },
    },
  },
  {
    stage: 'in-work', hoursAgo: 45, quantity: 1000, paceFactor: 1.05, customer: HESSARY.email,
    enquiry: {
      contact: { ...HESSARY, title: 'Shuttle return', remarks: 'Runs in oil.' },
      requirement: { ...usual, need: { knows: 'two-loads', first: { forceN: 12, lengthMm: 28 }, second: { forceN: 30, lengthMm: 18 } }, boreMm: 14 },
    },
  },
  {
    stage: 'planned', hoursAgo: 40, quantity: 500, paceFactor: 1, customer: TARNBECK.email,
    enquiry: {
      contact: { ...TARNBECK, title: 'Bottle filler return', remarks: 'The old one lost length after a year.' },
      requirement: { ...usual, need: { knows: 'two-loads', first: { forceN: 60, lengthMm: 50 }, second: { forceN: 150, lengthMm: 35 } }, boreMm: 26, maxFreeLengthMm: 70, surroundings: 'damp', hottestC: 40 },
    },
  },
  {
    stage: 'planned', hoursAgo: 36, quantity: 1000, paceFactor: 1, customer: TARNBECK.email,
    enquiry: {
      contact: { ...TARNBECK, title: 'Quarter-turn lever return', remarks: '' },
      requirement: { ...turned, need: { knows: 'moment-from-free', load: { momentNmm: 500, angleDeg: 90 } }, firstLegMm: 30, secondLegMm: 30, rodMm: 7 },
    },
  },
  {
    stage: 'deposit-paid', hoursAgo: 30, quantity: 2000, paceFactor: 1, customer: HESSARY.email,
    enquiry: {
      contact: { ...HESSARY, title: 'Heddle frame spring', remarks: '' },
      requirement: { ...usual, need: { knows: 'rate-and-length', rateNPerMm: 1.4, freeLengthMm: 55, shortestLengthMm: 30 }, boreMm: 22 },
    },
  },
  {
    stage: 'deposit-paid', hoursAgo: 26, quantity: 1000, paceFactor: 1, customer: HESSARY.email,
    enquiry: {
      contact: { ...HESSARY, title: 'Selvedge finger spring', remarks: 'Stainless, please: it is washed down.' },
      requirement: { ...pulled, material: 'EN10270-3-1.4310', hook: 'crossover-loop', need: { knows: 'two-loads', first: { forceN: 5, lengthMm: 40 }, second: { forceN: 15, lengthMm: 55 } } },
    },
  },
  {
    stage: 'quoted', hoursAgo: 20, quantity: 250, paceFactor: 1, customer: TARNBECK.email,
    enquiry: {
      contact: { ...TARNBECK, title: 'Relief of a hand pump', remarks: 'For a trial.' },
      requirement: { ...usual, need: { knows: 'two-loads', first: { forceN: 20, lengthMm: 45 }, second: { forceN: 75, lengthMm: 30 } }, boreMm: 24 },
    },
  },
  {
    stage: 'quoted', hoursAgo: 18, quantity: 100, paceFactor: 1, customer: HESSARY.email,
    enquiry: {
      contact: { ...HESSARY, title: 'Cover hinge of a winder', remarks: '' },
      requirement: { ...turned, need: { knows: 'moment-and-rate', load: { momentNmm: 2000, angleDeg: 60 }, rateNmmPerDeg: 25 }, firstLegMm: 40, secondLegMm: 20, legForm: 'straight' },
    },
  },
  {
    stage: 'enquiry', hoursAgo: 17, quantity: 20, paceFactor: 1, customer: TARNBECK.email,
    enquiry: {
      contact: { ...TARNBECK, title: 'Hand brake of an inspection trolley', remarks: 'We rebuild the hand brake of a four-wheel inspection trolley. We carry visitors on it, at walking pace.' },
      requirement: { ...usual, quantities: [6, 20], couldHurt: 'yes-or-unsure', need: { knows: 'two-loads', first: { forceN: 900, lengthMm: 100 }, second: { forceN: 2000, lengthMm: 88 } }, boreMm: 46 },
    },
  },
  {
    stage: 'enquiry', hoursAgo: 14, quantity: 50, paceFactor: 1, customer: TARNBECK.email,
    enquiry: {
      contact: { ...TARNBECK, title: 'Counterweight of a sluice gate', remarks: 'It holds the hand gate open while people pass below.' },
      requirement: { ...pulled, quantities: [10, 50], couldHurt: 'yes-or-unsure', hook: 'extended-hook', need: { knows: 'two-loads', first: { forceN: 150, lengthMm: 250 }, second: { forceN: 400, lengthMm: 350 } } },
    },
  },
  {
    stage: 'enquiry', hoursAgo: 9, quantity: 250, paceFactor: 1, customer: TARNBECK.email,
    enquiry: {
      contact: { ...TARNBECK, title: 'Contact finger of a float switch', remarks: 'Must carry 200 mA and not rust.' },
      requirement: { ...turned, quantities: [100, 250], material: 'ASTM-B159', surroundings: 'damp', need: { knows: 'moment-from-free', load: { momentNmm: 40, angleDeg: 60 } }, firstLegMm: 15, secondLegMm: 15 },
    },
  },
  {
    stage: 'enquiry', hoursAgo: 5, quantity: 100, paceFactor: 1, customer: HESSARY.email,
    enquiry: {
      contact: { ...HESSARY, title: 'Spring for a dye bath gate', remarks: 'Sits in warm dye, acid at times.' },
      requirement: { ...usual, quantities: [50, 100, 200], surroundings: 'chemical', hottestC: 90, need: { knows: 'two-loads', first: { forceN: 30, lengthMm: 70 }, second: { forceN: 80, lengthMm: 50 } }, boreMm: 40 },
    },
  },
]
