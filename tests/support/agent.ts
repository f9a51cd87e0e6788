import { TEST_PASSWORD } from '../builders/user.ts'

/** An answer of the server, read to its end. */
export interface Answer {
  status: number
  headers: Headers
  /** The JSON body; undefined when the answer has none. */
  body: unknown
  bytes: Buffer
}

/** A browser's worth of client: keeps its cookie and sends the header that writes need. */
export interface TestAgent {
  cookie: string
  request(method: string, path: string, options?: { body?: unknown; headers?: Record<string, string> }): Promise<Answer>
  get(path: string): Promise<Answer>
  post(path: string, body?: unknown): Promise<Answer>
  put(path: string, body?: unknown): Promise<Answer>
  patch(path: string, body?: unknown): Promise<Answer>
  delete(path: string): Promise<Answer>
  /** Sends files (multipart), as the upload form does. */
  send(path: string, form: FormData): Promise<Answer>
  signIn(email: string, password?: string): Promise<Answer>
}

/** `path` starts after /api. */
export function createAgent(url: string): TestAgent {
  const agent: TestAgent = {
    cookie: '',
    request: async (method, path, { body, headers = {} } = {}) => {
      const isForm = body instanceof FormData
      const response = await fetch(`${url}/api${path}`, {
        method,
        headers: {
          'X-Sheafbook': '1',
          ...(agent.cookie === '' ? {} : { Cookie: agent.cookie }),
          ...(body === undefined || isForm ? {} : { 'Content-Type': 'application/json' }),
          ...headers,
        },
        ...(body === undefined ? {} : { body: isForm ? body : JSON.stringify(body) }),
      })
      agent.cookie = cookieAfter(agent.cookie, response.headers.getSetCookie())
      return readAnswer(response)
    },
    get: (path) => agent.request('GET', path),
    post: (path, body) => agent.request('POST', path, { body }),
    put: (path, body) => agent.request('PUT', path, { body }),
    patch: (path, body) => agent.request('PATCH', path, { body }),
    delete: (path) => agent.request('DELETE', path),
    send: (path, form) => agent.request('POST', path, { body: form }),
    signIn: (email, password = TEST_PASSWORD) => agent.post('/session', { email, password }),
  }
  return agent
}

async function readAnswer(response: Response): Promise<Answer> {
  const bytes = Buffer.from(await response.arrayBuffer())
  const isJson = response.headers.get('content-type')?.includes('json') ?? false
  return { status: response.status, headers: response.headers, bytes, body: isJson ? JSON.parse(bytes.toString()) : undefined }
}

function cookieAfter(before: string, set: string[]): string {
  const jar = new Map(before.split('; ').filter(Boolean).map(splitCookie))
  for (const line of set) {
    const [name, value] = splitCookie(line.split(';')[0] ?? '')
    if (value === '') jar.delete(name)
    else jar.set(name, value)
  }
  return [...jar].map(([name, value]) => `${name}=${value}`).join('; ')
}

function splitCookie(pair: string): [string, string] {
  const at = pair.indexOf('=')
  return [pair.slice(0, at), pair.slice(at + 1)]
}
