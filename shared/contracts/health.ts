import { z } from 'zod'

/** GET /api/health: 200 when the database answers, 503 when not. */
export const healthSchema = z
  .object({ status: z.enum(['ok', 'unavailable']), database: z.boolean(), version: z.string() })
  .meta({ id: 'Health' })
export type Health = z.infer<typeof healthSchema>
