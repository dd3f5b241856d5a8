import type { Role } from '../../shared/contracts/common'

/** Who acts, and in which group. Services trust it: the access check of each route, or the caller, has made it. */
export interface Member {
  readonly groupId: string
  readonly userId: string
  readonly role: Role
  /** The name of the key by which a script acts for the person; not there when they act themselves. */
  readonly by?: string
}

/** A file as it came in. */
export interface UploadedFile {
  readonly name: string
  readonly bytes: Uint8Array
}

/** A file to hand out. */
export interface Download {
  readonly fileName: string
  readonly bytes: Uint8Array
}
