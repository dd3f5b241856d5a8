import type { HandOver } from '../../entities/hand-over.entity'

/** What a hand-over is called in the history and in e-mails: its number once it has one, and its title. */
export function handOverName({ number, title }: Pick<HandOver, 'number' | 'title'>): string {
  return number === null ? title : `Hand-over ${number}, ${title}`
}

/** A hand-over as the subject of a line in the history. */
export function handOverSubject(handOver: Pick<HandOver, 'id' | 'number' | 'title'>) {
  return { kind: 'hand-over', id: handOver.id, name: handOverName(handOver) }
}
