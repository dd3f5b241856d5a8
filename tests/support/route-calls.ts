import type { Response } from 'supertest'
import type { AnyRoute } from '../../server/routes/route'
import type { Method, TextFile } from './api-client'
import { buildJob, type Job } from './job-builder'
import { ROUTE_SAMPLES, type SampleWorld } from './route-samples'

/** Whoever can send requests: a browser or a script. */
export interface Caller {
  send(method: Method, path: string, body?: object): Promise<Response>
  upload(path: string, settings: unknown, file: TextFile): Promise<Response>
}

/** Sends the sample of a route. */
export async function callRoute(
  caller: Caller,
  route: AnyRoute,
  world: SampleWorld,
  path?: string,
): Promise<Response> {
  const { ids, query, body, file } = await ROUTE_SAMPLES[nameOf(route)](world)
  const address = path ?? pathOf(route, world, ids)
  const url = query === undefined ? address : `${address}?${query}`
  return file ? caller.upload(url, body, file) : caller.send(route.method, url, body)
}

/** A route by method and path. */
export function nameOf({ method, path }: AnyRoute): string {
  return `${method} ${path}`
}

/** The path of a route with the ids of a job and its group. */
export function pathOf(
  { path }: AnyRoute,
  { group, job }: SampleWorld,
  ids: Readonly<Record<string, string>> = {},
): string {
  // The route that takes a new distribution is asked for the angle, all others for the bond that has data.
  const termId = path.endsWith('/distributions') ? job.angleId : job.bondId
  const all: Record<string, string> = { groupId: group.groupId, termId, ...idsOf(job), ...ids }
  return path.replace(/:(\w+)/g, (_, name: string) => all[name])
}

function idsOf(job: Job): Record<string, string> {
  const { polymerId, statePointId, mappingId, distributionId, potentialId, jointDistributionId } = job
  return { polymerId, statePointId, mappingId, distributionId, potentialId, jointDistributionId }
}

/** The same world for a route that reads; one with a job of its own for a route that writes. */
export async function worldFor(route: AnyRoute, world: SampleWorld): Promise<SampleWorld> {
  if (route.method === 'get') return world
  const { server, group } = world
  const joint = route.path.includes(':jointDistributionId')
  const job = await buildJob(server.services, group.modeller.member, { joint })
  if (nameOf(route) === 'delete /api/state-points/:statePointId') {
    await server.services.distributions.remove(group.owner.member, job.distributionId)
  }
  return { ...world, job }
}
