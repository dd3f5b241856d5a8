import type { ApiServer } from '../api-server'
import type { TextFile } from '../api-client'
import type { TestGroup } from '../group-builder'
import type { Job } from '../job-builder'

/** What a sample may build on. */
export interface SampleWorld {
  readonly server: ApiServer
  readonly group: TestGroup
  /** A whole job of the group. Of a route that writes, made anew for each request. */
  readonly job: Job
  /** A second mapping of the job's polymer. */
  readonly otherMappingId: string
}

/** What a valid request to a route holds beside its path. */
export interface Sample {
  /** Parameters of the path beyond those of the job and the group. */
  readonly ids?: Readonly<Record<string, string>>
  readonly query?: string
  readonly body?: object
  readonly file?: TextFile
}

/** One valid request per route, by method and path: the sample makes the records it needs. */
export type RouteSamples = Readonly<Record<string, (world: SampleWorld) => Sample | Promise<Sample>>>
