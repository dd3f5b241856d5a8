import { z } from 'zod'
import { idSchema } from '../../shared/contracts/common'

/** Query of what holds at one state point. */
export const atStatePoint = z.object({ statePoint: idSchema })
