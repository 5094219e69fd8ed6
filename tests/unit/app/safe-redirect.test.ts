import { describe, expect, it } from 'vitest'
import { safeRedirect } from '~/utils/safe-redirect'
import { homeOf } from '~/utils/staff-places'

describe('where a sign-in may lead (S-25)', () => {
  it.each([['/account', '/account'], ['/quotes/OX-1?key=a#pay', '/quotes/OX-1?key=a#pay'], ['/a/../b', '/b']])('goes to %s', (given, to) => {
    expect(safeRedirect(given)).toBe(to)
  })

  it.each(['//evil.example', '/\\evil.example', '\\\\evil', 'https://evil.example', 'javascript:alert(1)', '/\t/evil.example', '/ok\\..\\evil', 'account', '', null, undefined, ['/account']])('never goes to %j', (given) => {
    expect(safeRedirect(given)).toBeNull()
  })
})

describe('where a person starts', () => {
  it.each([[['customer'], '/account'], [['estimator'], '/estimating'], [['supervisor'], '/loading'], [['operator'], '/bench'], [['bookkeeper'], '/ledger'], [['admin'], '/estimating'], [[], '/account']])('%j at %s', (roles, place) => {
    expect(homeOf(roles)).toBe(place)
  })
})
