import { randomUUID } from 'node:crypto'
import type { IncomingMessage, ServerResponse } from 'node:http'
import type { RequestHandler } from 'express'
import type { Logger } from 'pino'
import { pinoHttp } from 'pino-http'

/** The id of a request, as its answer and the log name it. */
export function requestIdOf(request: IncomingMessage): string {
  return request.id as string
}

/** One line per request, with the id that the answer carries too. Neither headers nor bodies are logged. */
export function createRequestLog(logger: Logger): RequestHandler {
  return pinoHttp<IncomingMessage, ServerResponse>({
    logger,
    genReqId: (_request, response) => {
      const id = randomUUID()
      response.setHeader('X-Request-Id', id)
      return id
    },
    quietReqLogger: true,
    serializers: {
      req: ({ id, method, url }: { id: unknown; method: string; url: string }) => ({
        id,
        method,
        url: withoutSecrets(url),
      }),
      res: ({ statusCode }: { statusCode: number }) => ({ statusCode }),
    },
    customLogLevel: (_request, { statusCode }) => (statusCode >= 500 ? 'error' : 'info'),
    // The error itself is logged where it is answered.
    customErrorObject: (request, response) => ({ req: request, res: response }),
  })
}

/** A link is a secret that stands in a path. */
function withoutSecrets(url: string): string {
  return url.replace(/(\/(?:set-up|join|reset|password-resets|received)\/)[^/?#]+/, '$1[token]')
}
