/** Makes the absolute address of a page from its path, for e-mails. */
export type LinkTo = (path: string) => string

/**
 * @param publicUrl where people find this server; asked for each link, since the port may be known only once it listens
 */
export function linksFrom(publicUrl: () => string): LinkTo {
  return (path) => `${publicUrl().replace(/\/+$/, '')}${path}`
}
