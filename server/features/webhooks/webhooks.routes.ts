import { z } from 'zod'
import { idSchema } from '../../../shared/schemas/user.ts'
import {
  changeWebhookSchema,
  createdWebhookSchema,
  deliverySchema,
  saveWebhookSchema,
  webhookSchema,
} from '../../../shared/schemas/webhook.ts'
import { type Route, route } from '../../http/route.ts'
import { changeWebhook, createWebhook, deleteWebhook, listOwnDeliveries, listOwnWebhooks } from './webhooks.service.ts'

const OWNERS = ['analyst', 'admin'] as const
const params = z.object({ id: idSchema })

export const webhookRoutes: Route[] = [
  route({
    method: 'get',
    path: '/webhooks',
    summary: 'Your webhooks, newest first',
    access: OWNERS,
    scope: 'webhooks',
    response: z.array(webhookSchema),
    handle: ({ deps, actor }) => listOwnWebhooks(deps, actor),
  }),
  route({
    method: 'post',
    path: '/webhooks',
    summary: 'Make a webhook (Standard Webhooks): its secret is in this answer and never again',
    access: OWNERS,
    scope: 'webhooks',
    body: saveWebhookSchema,
    response: createdWebhookSchema,
    status: 201,
    handle: ({ deps, actor, body }) => createWebhook(deps, actor, body),
  }),
  route({
    method: 'patch',
    path: '/webhooks/:id',
    summary: 'Pause a webhook, or take it up again; what happened meanwhile stands in the changes',
    access: OWNERS,
    scope: 'webhooks',
    params,
    body: changeWebhookSchema,
    response: webhookSchema,
    handle: ({ deps, actor, params, body }) => changeWebhook(deps, actor, params.id, body.state),
  }),
  route({
    method: 'delete',
    path: '/webhooks/:id',
    summary: 'Remove a webhook with its log',
    access: OWNERS,
    scope: 'webhooks',
    params,
    handle: async ({ deps, actor, params, res }) => {
      await deleteWebhook(deps, actor, params.id)
      res.status(204).end()
    },
  }),
  route({
    method: 'get',
    path: '/webhooks/:id/deliveries',
    summary: 'The newest 50 messages of a webhook, and what became of them',
    access: OWNERS,
    scope: 'webhooks',
    params,
    response: z.array(deliverySchema),
    handle: ({ deps, actor, params }) => listOwnDeliveries(deps, actor, params.id),
  }),
]
