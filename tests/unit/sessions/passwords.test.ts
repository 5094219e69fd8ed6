import { describe, expect, it } from 'vitest'
import { isCommonPassword } from '../../../server/services/sessions/common-passwords'
import { lifetimeOf } from '../../../server/services/sessions/lifetimes'
import { hashPassword, isPassword } from '../../../server/services/sessions/passwords'
import { delayAfter } from '../../../server/services/sessions/sign-in'

const aoife = { name: 'Aoife Byrne', email: 'aoife.byrne@tarnbeck.example', companyName: 'Tarnbeck Valves' }

describe('a password that is guessed early (S-36)', () => {
  it.each(['password', 'Password123!', 'p@ssw0rd', 'PASSWORD2026', 'qwerty12', '12345678', '87654321', 'aaaaaaaa', 'abababab', 'oxmere2026', 'Oxmere Spring', 'wirewright', 'aoifebyrne', 'Byrne-Aoife-99', 'Tarnbeck#1', 'tarnbeckvalves', '19841984', '!!!!????', 'letmein!!', 'summer2026'])('%s is refused', (password) => {
    expect(isCommonPassword(password, aoife)).toBe(true)
  })

  it.each(['heron lintel forty', 'correct horse battery staple', 'dP7#kw_29xLq', 'ein Löffel voll Regen', ' leading space kept', '918273645546', '🦢🪵🧭🪡🧶🪝🫖🪴'])('%s is taken', (password) => {
    expect(isCommonPassword(password, aoife)).toBe(false)
  })
})

describe('hashing', () => {
  it('proves the right password and no other, with a new salt each time', async () => {
    const [one, two] = await Promise.all([hashPassword('heron lintel forty'), hashPassword('heron lintel forty')])
    expect(one).not.toBe(two)
    expect(await isPassword(one, 'heron lintel forty')).toBe(true)
    expect(await isPassword(one, 'heron lintel fort')).toBe(false)
    expect(await isPassword(one, 'heron lintel forty ')).toBe(false)
  })

  it('takes its time without an account, too, and never says yes', async () => {
    const passwordHash = await hashPassword('heron lintel forty')
    await isPassword(null, 'warm up')
    const time = async (known: string | null) => {
      const startMs = performance.now()
      for (let round = 0; round < 5; round += 1) expect(await isPassword(known, 'wrong')).toBe(false)
      return performance.now() - startMs
    }
    const [withAccount, without] = [await time(passwordHash), await time(null)]
    expect(without / withAccount).toBeGreaterThan(0.5)
    expect(without / withAccount).toBeLessThan(2)
  })
})

describe('how long a session lasts', () => {
  it('is the shortest of its roles', () => {
    expect(lifetimeOf(['customer'])).toEqual({ absoluteMinutes: 43_200, idleMinutes: 10_080 })
    expect(lifetimeOf(['customer', 'operator'])).toEqual({ absoluteMinutes: 720, idleMinutes: 240 })
    expect(lifetimeOf(['estimator', 'admin'])).toEqual({ absoluteMinutes: 720, idleMinutes: 60 })
    expect(lifetimeOf([])).toEqual(lifetimeOf(['customer']))
  })
})

describe('the wait after wrong passwords', () => {
  it('begins after twenty, and never locks', () => {
    expect([0, 20, 21, 30, 40, 10_000].map(delayAfter)).toEqual([0, 0, 100, 1_000, 2_000, 2_000])
  })
})
