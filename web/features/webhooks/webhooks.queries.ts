import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import {
  createdWebhookSchema,
  deliverySchema,
  type SaveWebhook,
  type Webhook,
  webhookSchema,
} from '../../../shared/schemas/webhook.ts'
import { api } from '../../lib/api.ts'

export const webhookQueries = {
  all: () => ['webhooks'] as const,
  list: () =>
    queryOptions({
      queryKey: [...webhookQueries.all(), 'list'],
      queryFn: ({ signal }) => api.get('/webhooks', z.array(webhookSchema), signal),
    }),
  deliveries: (id: string) =>
    queryOptions({
      queryKey: [...webhookQueries.all(), 'deliveries', id],
      queryFn: ({ signal }) => api.get(`/webhooks/${id}/deliveries`, z.array(deliverySchema), signal),
    }),
}

function useAct<Input, Output>(act: (input: Input) => Promise<Output>) {
  const cache = useQueryClient()
  return useMutation({ mutationFn: act, onSuccess: () => cache.invalidateQueries({ queryKey: webhookQueries.all() }) })
}

export const useMakeWebhook = () => useAct((input: SaveWebhook) => api.post('/webhooks', input, createdWebhookSchema))
export const useSetWebhookState = () =>
  useAct(({ id, state }: Pick<Webhook, 'id' | 'state'>) => api.patch(`/webhooks/${id}`, { state }, webhookSchema))
export const useRemoveWebhook = () => useAct((id: string) => api.delete(`/webhooks/${id}`))
