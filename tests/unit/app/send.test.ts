import { describe, expect, it } from 'vitest'
import { toSendError } from '~/utils/send'

const fetchError = (response: unknown, data: unknown) => Object.assign(new Error('[POST] "/api/x": 422'), { name: 'FetchError', response, data })

describe('what a refused request tells the person', () => {
  it('gives the server’s sentence and one message per field', () => {
    const error = toSendError(fetchError({ status: 422 }, { type: 'about:blank', title: 'Some values are wrong', status: 422, detail: '2 values need another look.', requestId: 'r1', errors: [{ path: 'requirement.boreMm', message: 'First.' }, { path: 'requirement.boreMm', message: 'Second.' }] }))
    expect(error).toMatchObject({ detail: '2 values need another look.', status: 422, requestId: 'r1', fieldErrors: { 'requirement.boreMm': 'First.' } })
  })

  it('reads problem details that came as text', () => {
    expect(toSendError(fetchError({ status: 409 }, '{"title":"No","status":409,"detail":"Taken."}')).detail).toBe('Taken.')
  })

  it('never shows what a proxy or the network wrote', () => {
    expect(toSendError(fetchError({ status: 502 }, '<html>Bad gateway</html>')).detail).toBe('This did not work. Try again.')
    expect(toSendError(fetchError(undefined, undefined)).detail).toContain('could not be reached')
    expect(toSendError(new TypeError('Failed to fetch dynamically imported module: /_nuxt/x.js')).detail).toBe('This did not work. Try again.')
  })
})
