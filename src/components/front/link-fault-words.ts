import type { LinkFault } from '@shared/contracts/people'

/** What is wrong with a link and what to do about it, in words. */
export const linkFaultWords = (
  fault: LinkFault,
  what: 'invitation' | 'link',
): { readonly title: string; readonly text: string } => {
  const again = what === 'invitation' ? 'Ask an owner of the group to send it again.' : 'Ask for another one.'
  switch (fault) {
    case 'unknown':
      return { title: `There is no such ${what}`, text: `Look whether all of the link was copied. ${again}` }
    case 'used':
      return { title: `This ${what} has been used`, text: 'It works once. If it was you, sign in.' }
    case 'revoked':
      return { title: `This ${what} was taken back`, text: `Or a newer one was sent: look for it. ${again}` }
    case 'expired':
      return { title: `This ${what} is out of date`, text: again }
  }
}
