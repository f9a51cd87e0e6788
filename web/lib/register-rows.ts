import { queryOptions } from '@tanstack/react-query'
import { z } from 'zod'
import { REGISTERS, type RegisterName, type RegisterRows } from '../../shared/schemas/register.ts'
import { api } from './api.ts'

/** The registers, as several features read them: edited in one, chosen from in others. */
export const registerQueries = {
  all: () => ['registers'] as const,
  rows: <N extends RegisterName>(name: N) =>
    queryOptions({
      queryKey: [...registerQueries.all(), name],
      queryFn: async ({ signal }): Promise<RegisterRows[N][]> =>
        (await api.get(`/registers/${name}`, z.array(REGISTERS[name].row), signal)) as RegisterRows[N][],
    }),
}
