/** Webhooks by the Standard Webhooks specification: the book tells a program that something was entered or changed. */
import { z } from 'zod'
import { idSchema } from './user.ts'

export const WEBHOOK_EVENTS = ['record.entered', 'record.changed'] as const
export const webhookEventSchema = z.enum(WEBHOOK_EVENTS)
export type WebhookEvent = z.infer<typeof webhookEventSchema>

export const WEBHOOK_LIMITS = { a_person: 10 } as const

export const webhookSchema = z.object({
  id: idSchema,
  url: z.string(),
  events: z.array(webhookEventSchema),
  /** paused: nothing is sent; what happened meanwhile stands in the change feed. */
  state: z.enum(['active', 'paused']),
  pausedBecause: z.string().nullable(),
  createdAt: z.string(),
  lastDeliveredAt: z.string().nullable(),
})
export type Webhook = z.infer<typeof webhookSchema>

export const saveWebhookSchema = z.object({
  url: z.url({ protocol: /^https?$/, error: 'an address such as https://data.example.org/sheafbook' }).max(500),
  events: z.array(webhookEventSchema).min(1, 'choose at least one'),
})
export type SaveWebhook = z.infer<typeof saveWebhookSchema>

/** The only answer that ever holds the secret. */
export const createdWebhookSchema = webhookSchema.extend({ secret: z.string() })
export type CreatedWebhook = z.infer<typeof createdWebhookSchema>

export const changeWebhookSchema = z.object({ state: z.enum(['active', 'paused']) })

export const deliverySchema = z.object({
  /** The `webhook-id` of every attempt. */
  id: idSchema,
  event: z.string(),
  state: z.enum(['waiting', 'delivered', 'failed']),
  attempts: z.number().int(),
  /** HTTP status of the last attempt; null when none was answered. */
  status: z.number().int().nullable(),
  trouble: z.string().nullable(),
  createdAt: z.string(),
  lastAt: z.string().nullable(),
})
export type Delivery = z.infer<typeof deliverySchema>

/** What is sent: enough to ask for the rest. */
export const webhookPayloadSchema = z.object({
  type: webhookEventSchema,
  timestamp: z.string(),
  data: z.object({ record: z.number().int(), version: z.number().int(), url: z.string() }),
})
export type WebhookPayload = z.infer<typeof webhookPayloadSchema>
