import { inject } from 'vitest'

export type Answer<T = unknown> = { status: number, headers: Headers, body: T }

/** A browser without pages: keeps its cookies, and sends what our own pages send. */
export class Visitor {
  readonly cookies = new Map<string, string>()

  constructor(readonly baseUrl: string = inject('baseUrl')) {}

  get = <T = unknown>(path: string, headers: Record<string, string> = {}): Promise<Answer<T>> => this.#send<T>('GET', path, undefined, headers)
  post = <T = unknown>(path: string, body?: unknown, headers: Record<string, string> = {}): Promise<Answer<T>> => this.#send<T>('POST', path, body, headers)
  delete = <T = unknown>(path: string): Promise<Answer<T>> => this.#send<T>('DELETE', path, undefined, {})

  async #send<T>(method: string, path: string, body: unknown, headers: Record<string, string>): Promise<Answer<T>> {
    const response = await fetch(`${this.baseUrl}${path}`, {
      method, redirect: 'manual', body: body === undefined ? null : JSON.stringify(body),
      headers: {
        'x-wirewright': '1', ...(body === undefined ? {} : { 'content-type': 'application/json' }),
        ...(this.cookies.size > 0 ? { cookie: [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ') } : {}), ...headers,
      },
    })
    for (const line of response.headers.getSetCookie()) {
      const [, name = '', value = ''] = /^([^=]+)=([^;]*)/.exec(line) ?? []
      if (value === '' || /max-age=0\b/i.test(line)) this.cookies.delete(name)
      else this.cookies.set(name, value)
    }
    const text = await response.text()
    const isJson = (response.headers.get('content-type') ?? '').includes('json')
    return { status: response.status, headers: response.headers, body: (isJson && text !== '' ? JSON.parse(text) : text) as T }
  }
}

/** A visitor who has signed in with a password. */
export async function signInAs(email: string, password: string, baseUrl?: string): Promise<Visitor> {
  const visitor = new Visitor(baseUrl)
  const { status, body } = await visitor.post('/api/auth/login', { email, password })
  if (status !== 200) throw new Error(`${email} could not sign in: ${status} ${JSON.stringify(body)}`)
  return visitor
}

/** A visitor signed in as somebody of the demonstration who has the role. */
export async function signInAsRole(role: string, baseUrl?: string): Promise<Visitor> {
  const person = inject('demoSignIns').find(one => one.role === role)
  if (!person) throw new Error(`the seed has nobody who is ${role}`)
  return signInAs(person.email, person.password, baseUrl)
}
