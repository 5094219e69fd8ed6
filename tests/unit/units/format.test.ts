import { describe, expect, it } from 'vitest'
import { decimalsFor, formatForce, formatLength, formatMass, formatNumber, formatRate, formatShare, formatStress, formatTemperature, formatWireDiameter } from '#shared/units/format'

const thin = '\u202f'

describe('writing numbers', () => {
  it('groups thousands with a thin space and leaves the places alone', () => {
    expect(formatNumber(1234567.891, 3)).toBe(`1${thin}234${thin}567.891`)
    expect(formatNumber(999.5, 1)).toBe('999.5')
    expect(formatNumber(999.96, 1)).toBe(`1${thin}000.0`)
  })

  it('writes a true minus, but never a negative nought', () => {
    expect(formatNumber(-3.25, 2)).toBe('\u22123.25')
    expect(formatNumber(-0.004, 2)).toBe('0.00')
  })

  it('writes a dash, and no unit, where there is no finite value', () => {
    for (const value of [Number.NaN, Infinity, -Infinity]) {
      expect(formatNumber(value, 1)).toBe('–')
      expect(formatForce(value, 'metric')).toBe('–')
      expect(formatMass(value, 'inch')).toBe('–')
      expect(formatShare(value)).toBe('–')
    }
  })

  it('gives about four figures', () => {
    expect([0.603, 6.03, 60.3, 150.7, 1204].map(decimalsFor)).toEqual([3, 2, 1, 1, 0])
  })
})

describe('writing quantities', () => {
  it('writes the spring of the demonstration quote in metric units', () => {
    expect(formatLength(60, 'metric')).toBe(`60.0${thin}mm`)
    expect(formatWireDiameter(2.5, 'metric')).toBe(`2.50${thin}mm`)
    expect(formatWireDiameter(0.063, 'metric')).toBe(`0.063${thin}mm`)
    expect(formatForce(150.74, 'metric')).toBe(`150.7${thin}N`)
    expect(formatRate(6.0296, 'metric')).toBe(`6.03${thin}N/mm`)
    expect(formatStress(1064.2, 'metric')).toBe(`1${thin}064${thin}MPa`)
    expect(formatMass(24.81, 'metric')).toBe(`24.8${thin}g`)
    expect(formatMass(12400, 'metric')).toBe(`12.4${thin}kg`)
    expect(formatTemperature(40, 'metric')).toBe(`40${thin}°C`)
    expect(formatShare(0.332)).toBe(`33${thin}%`)
  })

  it('writes the same spring in inch units', () => {
    expect(formatLength(60, 'inch')).toBe(`2.362${thin}in`)
    expect(formatWireDiameter(2.5, 'inch')).toBe(`0.0984${thin}in`)
    expect(formatForce(150.74, 'inch')).toBe(`33.9${thin}lbf`)
    expect(formatRate(6.0296, 'inch')).toBe(`34.43${thin}lbf/in`)
    expect(formatStress(1064.2, 'inch')).toBe(`154.3${thin}ksi`)
    expect(formatMass(24.81, 'inch')).toBe(`0.875${thin}oz`)
    expect(formatMass(12400, 'inch')).toBe(`27.3${thin}lb`)
    expect(formatTemperature(40, 'inch')).toBe(`104${thin}°F`)
  })

  it('leaves the unit off, or takes other places, when asked', () => {
    expect(formatLength(60, 'metric', { unit: false })).toBe('60.0')
    expect(formatForce(150.74, 'metric', { decimals: 0 })).toBe(`151${thin}N`)
  })
})
