import type { z } from 'zod'
import type { Role } from '../../shared/contracts/common'
import type { ApiCode } from '../../shared/contracts/error'
import type { KeyScope } from '../../shared/contracts/key'
import type { LimitKind } from '../middleware/limits'
import type { Visitor } from '../middleware/visitor'
import type { Download, Member, Services, UploadedBlocks, UploadedFile } from '../services'
import type { Resource } from '../services/access.service'
import type { ReceivingParty } from '../services/delivery/party'
import type { ActingKey } from '../services/key.service'

/** What a route asks of a member, and the roles that may do it. Nobody reviews what is their own: services see to that. */
export const ROLES_FOR = {
  /** See the work of the group. */
  read: ['owner', 'modeller', 'reviewer'],
  /** Change the work of the group. */
  write: ['owner', 'modeller'],
  /** Sign off or send back. */
  review: ['owner', 'reviewer'],
  /** Run the group itself: people, defaults, history. */
  manage: ['owner'],
  /** Be in the group, in whatever role. */
  belong: ['owner', 'modeller', 'reviewer', 'collaborator'],
} as const satisfies Record<string, readonly Role[]>

/** Someone in the group of the record that the path names, in one of the roles that may. */
export interface MemberAccess {
  readonly may: keyof typeof ROLES_FOR
  /** Its id is the path's parameter of that name with Id behind it, as in :polymerId. */
  readonly at: Resource
}

/**
 * Who may ask: anyone without a session, anyone with one, someone signed in about what is their own, a script about its key,
 * whoever holds the link in the path's :token, someone signed in whom the hand-over in :handOverId was sent to, or members of a
 * group.
 */
export type Access = 'anyone' | 'visitor' | 'person' | 'key' | 'link' | 'recipient' | MemberAccess

type ParameterNames<Path extends string> = Path extends `${string}:${infer Name}/${infer Rest}`
  ? Name | ParameterNames<Rest>
  : Path extends `${string}:${infer Name}`
    ? Name
    : never

/** What a handler is given: everything parsed, everyone checked. */
export type Context<Path extends string, Query, Body, Who extends Access> = {
  readonly services: Services
  readonly params: Readonly<Record<ParameterNames<Path>, string>>
  readonly query: Query
  readonly body: Body
  /** The file of an upload route. */
  readonly file: UploadedFile
  /** Files of blocks and chains, of a route that takes them. */
  readonly blockFiles: UploadedBlocks
} & (Who extends MemberAccess ? { readonly member: Member } : object) &
  (Who extends 'visitor' ? { readonly visitor: Visitor } : object) &
  (Who extends 'person' ? { readonly visitor: Visitor; readonly userId: string } : object) &
  (Who extends 'key' ? { readonly key: ActingKey } : object) &
  (Who extends 'link' | 'recipient' ? { readonly recipient: ReceivingParty } : object)

/** What a route answers when all goes well. */
export type Answer<Result> =
  | {
      readonly status: 200 | 201
      readonly body: z.ZodType<Result>
      /** Another status for some results. */
      readonly statusFor?: (result: Result) => number
    }
  | { readonly status: 204 }
  | { readonly status: 200; readonly download: string }

/** One route of the API, said once: who may call it, what comes in, what goes out, and what does it. */
export interface Route<
  Path extends string = string,
  Query = unknown,
  Body = unknown,
  Result = unknown,
  Who extends Access = Access,
> {
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete'
  readonly path: Path
  /** One line for the API document. */
  readonly summary: string
  /** What else the API document says. */
  readonly description?: string
  readonly access: Who
  /** What a script's key needs; left out, it follows from method and resource, see `keyScopeOf`. null: no key opens it. */
  readonly scope?: KeyScope | null
  readonly query?: z.ZodType<Query>
  readonly body?: z.ZodType<Body>
  /** The body comes as multipart: one file, or one with files of its parts, and the rest as JSON in the field `settings`. */
  readonly upload?: 'single' | 'parted'
  readonly limited?: LimitKind | undefined
  readonly answer: Answer<Result>
  /** Codes beyond those that follow from access and form. */
  readonly errors?: readonly ApiCode[]
  /** The core may refuse the content: 422 with a code of the core. */
  readonly readsContent?: true
  handle(context: Context<Path, Query, Body, Who>): Promise<Result> | Result
}

/** Any route, as the mounting code sees it. */
export type AnyRoute = Omit<Route, 'handle' | 'answer' | 'query' | 'body'> & {
  readonly query?: z.ZodType
  readonly body?: z.ZodType
  readonly answer: {
    readonly status: number
    readonly body?: z.ZodType
    readonly download?: string
    readonly statusFor?: (result: never) => number
  }
  handle(context: never): unknown
}

/** Declares a route; the types of its handler follow from the rest. */
export function route<
  const Path extends string,
  Query = undefined,
  Body = undefined,
  Result = void,
  const Who extends Access = Access,
>(definition: Route<Path, Query, Body, Result, Who>): AnyRoute {
  return definition
}

/** A file as the answer of a route. */
export type DownloadResult = Download
