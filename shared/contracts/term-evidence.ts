import { z } from 'zod'

/** GET /api/mappings/:mappingId/evidence?statePoint=: what decides between terms that describe one motion. Terms by name. */
export const termEvidenceSchema = z
  .object({
    /** Independent samples; terms for which nobody knows them are absent. */
    samples: z.array(z.object({ name: z.string(), samples: z.number() })),
    /** Mutual information of two terms in nats, not below 0; pairs without joint data are absent. */
    couplings: z.array(z.object({ first: z.string(), second: z.string(), nats: z.number() })),
  })
  .meta({ id: 'TermEvidence' })
export type TermEvidence = z.infer<typeof termEvidenceSchema>
