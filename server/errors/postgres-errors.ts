import { HttpError } from './http-error'

/** Names that must be unique, by their constraint. */
const TAKEN: Readonly<Record<string, { readonly message: string; readonly field: string }>> = {
  UQ_polymer_name: { message: 'The group has a polymer of this name already.', field: 'name' },
  UQ_mapping_name: { message: 'The polymer has a mapping of this name already.', field: 'name' },
  UQ_layout_name: { message: 'The group has a layout of this name already.', field: 'name' },
  UQ_user_email: { message: 'Someone has an account with this e-mail address already.', field: 'email' },
}

const HANDED_OVER =
  'A hand-over stands on this. Delete the draft first; what was released stays for the record, with all it was made from.'

/** Records that stay because others stand on them, by the constraint that holds them. */
const STAYS: Readonly<Record<string, string>> = {
  FK_hand_over_polymer: HANDED_OVER,
  FK_hand_over_mapping: HANDED_OVER,
  FK_hand_over_state_point: HANDED_OVER,
  hand_over_immutable: 'A released hand-over never changes.',
}

const UNREACHABLE = new Set(['ECONNREFUSED', 'ECONNRESET', 'ENOTFOUND', 'ETIMEDOUT', 'EPIPE'])

const SAVED_MEANWHILE = 'Someone else changed this at the same moment. Load it again and repeat your change.'

/**
 * What an error of the database means to the person who asked, by its SQLSTATE; null for one that only a fault of ours
 * explains.
 */
export function translatePostgresError(error: unknown): HttpError | null {
  const { code, constraint } = postgresFields(error)
  if (code === undefined) return isConnectionLost(error) ? unavailable() : null
  if (code === '23505') {
    const taken = TAKEN[constraint ?? '']
    if (taken) return new HttpError('NAME_TAKEN', taken.message, { field: taken.field })
    return new HttpError('CONFLICT', SAVED_MEANWHILE)
  }
  const kept = STAYS[constraint ?? '']
  if (kept) return new HttpError('IN_USE', kept)
  // A record that this one points to went away while it was being written.
  if (code === '23503') return new HttpError('CONFLICT', SAVED_MEANWHILE)
  if (code === '40001' || code === '40P01' || code === '55P03')
    return new HttpError('CONFLICT', SAVED_MEANWHILE)
  if (code === '22021' || code === '22P05') {
    return new HttpError('VALIDATION_FAILED', 'The text holds a character that cannot be stored.')
  }
  // Connection lost, shutting down, starting up, database gone, too many connections.
  if (/^(08|57P0|53)/.test(code) || code === '3D000' || UNREACHABLE.has(code)) return unavailable()
  return null
}

function unavailable(): HttpError {
  return new HttpError('UNAVAILABLE', 'The database cannot be reached at the moment. Try again in a minute.')
}

/** The driver's own error lies inside the one that TypeORM throws; several tries to connect lie in an AggregateError. */
function postgresFields(error: unknown): { code?: string; constraint?: string } {
  if (typeof error !== 'object' || error === null) return {}
  const inner = (error as { driverError?: unknown }).driverError ?? error
  const { code, constraint } = inner as { code?: unknown; constraint?: unknown }
  return {
    code: typeof code === 'string' ? code : undefined,
    constraint: typeof constraint === 'string' ? constraint : undefined,
  }
}

function isConnectionLost(error: unknown): boolean {
  return (
    error instanceof Error &&
    /^(Connection terminated|timeout exceeded when trying to connect|Cannot use a pool after calling end|Driver not Connected)/i.test(
      error.message,
    )
  )
}
