/** Where the tests' app says it lives. */
export const TEST_ORIGIN = 'http://localhost:4103'

export type Answer = { status: number; body: unknown; text: string; headers: Headers }

/** A browser's worth of cookies against one server, from our own page unless told otherwise. */
export type Client = {
  get: (path: string) => Promise<Answer>
  send: (method: string, path: string, body?: unknown, headers?: Record<string, string>) => Promise<Answer>
  cookie: () => string
}

export function clientFor(url: string, startCookie = ''): Client {
  const cookies = new Map<string, string>()
  for (const pair of startCookie.split('; ').filter(Boolean))
    cookies.set(pair.slice(0, pair.indexOf('=')), pair.slice(pair.indexOf('=') + 1))
  const cookie = () => [...cookies].map(([name, value]) => `${name}=${value}`).join('; ')
  const send: Client['send'] = async (method, path, body, headers = {}) => {
    const response = await fetch(url + path, {
      method,
      redirect: 'manual',
      headers: {
        ...(cookies.size > 0 ? { cookie: cookie() } : {}),
        ...(method === 'GET' ? {} : { origin: TEST_ORIGIN }),
        ...(body === undefined || body instanceof FormData ? {} : { 'content-type': 'application/json' }),
        ...headers,
      },
      ...(body === undefined
        ? {}
        : { body: typeof body === 'string' || body instanceof FormData ? body : JSON.stringify(body) }),
    })
    for (const line of response.headers.getSetCookie()) {
      const [pair = '', ...attributes] = line.split('; ')
      const name = pair.slice(0, pair.indexOf('='))
      if (attributes.some((attribute) => /^max-age=0$/i.test(attribute))) cookies.delete(name)
      else cookies.set(name, pair.slice(pair.indexOf('=') + 1))
    }
    const text = await response.text()
    return { status: response.status, body: parsed(text), text, headers: response.headers }
  }
  return { get: (path) => send('GET', path), send, cookie }
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch {
    return undefined
  }
}
