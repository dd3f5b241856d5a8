import { z } from 'zod'
import { idSchema, timestampSchema } from './common'

/** A mail that stayed on this machine. */
export const caughtMailSchema = z
  .object({
    id: idSchema,
    caughtAt: timestampSchema,
    from: z.string(),
    to: z.string(),
    subject: z.string(),
    text: z.string(),
  })
  .meta({ id: 'CaughtMail' })
export type CaughtMail = z.infer<typeof caughtMailSchema>

/** GET /api/tray: the newest first. 404 where mails go out, or nowhere. */
export const traySchema = z.object({ mails: z.array(caughtMailSchema) }).meta({ id: 'Tray' })
export type Tray = z.infer<typeof traySchema>
