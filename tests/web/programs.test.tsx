import { screen, waitFor, within } from '@testing-library/react'
import { userEvent } from '@testing-library/user-event'
import { expect, test } from 'vitest'
import { z } from 'zod'
import { type ApiToken, createdTokenSchema, tokenSchema } from '../../shared/schemas/token.ts'
import { deliverySchema, type Webhook, webhookSchema } from '../../shared/schemas/webhook.ts'
import { documentSchema } from '../../web/features/interface/interface-model.ts'
import { answer, fakeApi, refusal } from './support/fake-api.ts'
import { renderApp, signedIn } from './support/render-app.tsx'

const TOKEN: ApiToken = {
  id: '00000000-0000-4000-8000-000000000021',
  name: 'nightly copy',
  ending: 'x7Qe',
  scopes: ['book', 'changes'],
  createdAt: '2026-11-02T08:00:00.000Z',
  expiresAt: '2126-02-01T08:00:00.000Z',
  lastUsedAt: null,
  revokedAt: null,
}
const SECRET = 'sheafbook_shown-once-in-this-test-only'

test('a token is made, shown once, and taken off the screen for good', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  let tokens: ApiToken[] = []
  api.on('GET', '/tokens', () => answer(z.array(tokenSchema), tokens))
  api.on('POST', '/tokens', () => {
    tokens = [TOKEN]
    return answer(createdTokenSchema, { ...TOKEN, token: SECRET }, 201)
  })
  const user = userEvent.setup()
  renderApp('/interface/tokens')
  await screen.findByText(/You have no token yet/)
  await user.click(screen.getByRole('button', { name: 'Make a token' }))
  await user.type(screen.getByLabelText('What it is for'), 'nightly copy')
  await user.click(screen.getByLabelText(/^changes:/))
  await user.click(screen.getByRole('button', { name: 'Make the token' }))
  await screen.findByText(SECRET)
  expect(api.writes()[0]?.body).toEqual({ name: 'nightly copy', scopes: ['book', 'changes'], days: 90 })
  await user.click(screen.getByRole('button', { name: /take it off the screen/ }))
  expect(screen.queryByText(SECRET)).toBeNull()
  expect(await screen.findByText('…x7Qe')).toBeDefined()
})

test('a token that is not described is not sent, and what the server refuses is said', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  api.on('GET', '/tokens', () => answer(z.array(tokenSchema), [TOKEN]))
  api.on('POST', '/tokens', () => refusal(409, 'conflict', 'You have 20 tokens in use. Revoke one first; none was made.'))
  const user = userEvent.setup()
  renderApp('/interface/tokens')
  await user.click(await screen.findByRole('button', { name: 'Make a token' }))
  await user.click(screen.getByRole('button', { name: 'Make the token' }))
  await screen.findByRole('alert')
  expect(api.writes()).toEqual([])
  await user.type(screen.getByLabelText('What it is for'), 'one more')
  await user.click(screen.getByRole('button', { name: 'Make the token' }))
  await screen.findByText(/You have 20 tokens in use/)
})

test('revoking says what happens next', async () => {
  const api = fakeApi()
  signedIn(api, 'admin')
  let tokens: ApiToken[] = [TOKEN]
  api.on('GET', '/tokens', () => answer(z.array(tokenSchema), tokens))
  api.on('POST', `/tokens/${TOKEN.id}/revoke`, () => {
    tokens = [{ ...TOKEN, revokedAt: '2026-12-01T08:00:00.000Z' }]
    return answer(tokenSchema, tokens[0]!)
  })
  const user = userEvent.setup()
  renderApp('/interface/tokens')
  await user.click(await screen.findByRole('button', { name: 'Revoke nightly copy' }))
  await screen.findByText('Revoked: nightly copy. Its next call is refused.')
  await screen.findByText(/^revoked/)
  expect(screen.queryByRole('button', { name: 'Revoke nightly copy' })).toBeNull()
})

test('a paused webhook says why, shows what was sent, and is taken up again', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  let webhook: Webhook = {
    id: '00000000-0000-4000-8000-000000000031',
    url: 'https://data.example/sheafbook',
    events: ['record.entered'],
    state: 'paused',
    pausedBecause: 'nothing could be delivered for days',
    createdAt: '2026-11-02T08:00:00.000Z',
    lastDeliveredAt: null,
  }
  api.on('GET', '/webhooks', () => answer(z.array(webhookSchema), [webhook]))
  api.on('PATCH', `/webhooks/${webhook.id}`, () => {
    webhook = { ...webhook, state: 'active', pausedBecause: null }
    return answer(webhookSchema, webhook)
  })
  api.on('GET', `/webhooks/${webhook.id}/deliveries`, () =>
    answer(z.array(deliverySchema), [
      {
        id: '00000000-0000-4000-8000-000000000041',
        event: 'record.entered',
        state: 'failed',
        attempts: 14,
        status: 500,
        trouble: 'answered 500',
        createdAt: '2026-11-20T08:00:00.000Z',
        lastAt: '2026-11-24T08:00:00.000Z',
      },
    ]),
  )
  const user = userEvent.setup()
  renderApp('/interface/webhooks')
  await screen.findByText('paused: nothing could be delivered for days')
  await user.click(screen.getByRole('button', { name: 'what was sent' }))
  const row = (await screen.findByText('answered 500')).closest('tr') as HTMLElement
  expect(within(row).getByText('14')).toBeDefined()
  await user.click(screen.getByRole('button', { name: 'take up again' }))
  await waitFor(() => expect(screen.queryByText(/^paused/)).toBeNull())
})

test('the guide lists what takes a token, and every route when asked', async () => {
  const api = fakeApi()
  signedIn(api, 'analyst')
  const described = (summary: string, tag: string, scope: string | null) => ({
    get: {
      summary,
      description: 'Open to: analyst.',
      tags: [tag],
      security: [{ session: [] }, ...(scope ? [{ token: [scope] }] : [])] as Record<string, string[]>[],
      parameters: [{ name: 'after', in: 'query', required: false, schema: { type: 'integer' } }],
      responses: {
        200: { content: { 'application/json': { schema: { type: 'object', properties: { next: { type: 'integer' } } } } } },
      },
    },
  })
  api.on('GET', '/openapi.json', () =>
    answer(documentSchema, {
      info: { title: 'Sheafbook', version: '1', description: 'Programs send a token.' },
      paths: {
        '/changes': described('What was entered', 'changes', 'changes'),
        '/mails': described('The outbox', 'mails', null),
      },
    }),
  )
  const user = userEvent.setup()
  renderApp('/interface')
  await screen.findByText('What was entered')
  expect(screen.queryByText('The outbox')).toBeNull()
  expect(screen.getByText(/curl -H "Authorization: Bearer \$TOKEN" "http.*\/api\/changes"/)).toBeDefined()
  await user.click(screen.getByRole('button', { name: /All routes/ }))
  await screen.findByText('The outbox')
})

test('a clerk is told for whom the interface is, and nothing is asked of the server', async () => {
  const api = fakeApi()
  signedIn(api, 'clerk')
  renderApp('/interface/tokens')
  await screen.findByText('The interface for programs is open to analysts.')
  expect(api.reads('/tokens')).toEqual([])
})
