import { createServer } from 'node:net'

/** Whether we could listen on `port` of `host` now. */
export function isPortFree(port, host = '127.0.0.1') {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', (error) => {
      if (error.code === 'EADDRINUSE' || error.code === 'EACCES') resolve(false)
      else reject(error)
    })
    server.listen(port, host, () => server.close(() => resolve(true)))
  })
}

/** The first free port from `from` on. */
export async function nextFreePort(from, host = '127.0.0.1') {
  for (let port = from; port <= 65535; port++) if (await isPortFree(port, host)) return port
  throw new RangeError(`No free port from ${from} on.`)
}
