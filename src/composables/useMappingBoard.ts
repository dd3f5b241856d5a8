import { computed, shallowRef, type ComputedRef, type ShallowRef } from 'vue'
import {
  addBead,
  type Bead,
  type BeadChange,
  changeBead,
  type AtomPlace,
  freeAtoms,
  giveAtomAcross,
  giveAtoms,
  type MappingDocument,
  removeBead,
  renewBeadIds,
  setShare,
  shareAtom,
} from '@shared/mapping'
import { useHistory, type History } from './useHistory'

/** A mapping while it is painted: the document with its history, and the bead in hand. */
export interface MappingBoard {
  readonly document: ComputedRef<MappingDocument>
  readonly history: History<MappingDocument>
  readonly selected: ComputedRef<Bead | null>
  readonly select: (beadId: string) => void
  /** The document as it looks during a stroke; null between strokes. */
  readonly stroke: ShallowRef<MappingDocument | null>
  /** Begins a stroke on an atom: it paints, or takes away when the atom is in the bead in hand already. */
  readonly begin: (atom: number) => void
  readonly paintOver: (atom: number) => void
  readonly end: () => void
  /** Ends a stroke as if it had not begun. */
  readonly drop: () => void
  readonly add: () => void
  readonly change: (beadId: string, change: BeadChange) => void
  readonly remove: (beadId: string) => void
  readonly give: (atoms: readonly number[], beadId: string) => void
  /** Shares an atom between the beads that hold it and the one in hand; takes that one out of the sharing when it is in. */
  readonly share: (atom: number) => void
  /** Sets the share that a bead holds of an atom; where two share it, the other holds the rest. */
  readonly weigh: (beadId: string, place: AtomPlace, weight: number) => void
  /** Gives an atom of a neighbouring unit to the bead in hand, or takes it away where that bead holds it. */
  readonly reach: (place: AtomPlace) => void
  /** Gives atoms to the bead in hand, a first one when there is none. */
  readonly gather: (atoms: readonly number[]) => void
  readonly free: (atoms: readonly number[]) => void
  /** Any other change of the document as one step; the same document is none. */
  readonly edit: (change: (document: MappingDocument) => MappingDocument) => void
  /** Takes over another mapping of the unit in place of what stands, its beads as new ones. */
  readonly adopt: (from: MappingDocument) => void
}

/** The state of the mapping board. Strokes and changes are steps of the history. */
export function useMappingBoard(first: MappingDocument): MappingBoard {
  const history = useHistory(first)
  const stroke = shallowRef<MappingDocument | null>(null)
  const chosen = shallowRef<string | null>(first.beads[0]?.id ?? null)
  let erasing = false

  const document = computed(() => stroke.value ?? history.value.value)
  const selected = computed(
    () => document.value.beads.find(({ id }) => id === chosen.value) ?? document.value.beads[0] ?? null,
  )

  const select = (beadId: string): void => {
    chosen.value = beadId
  }
  const newBead = (from: MappingDocument): MappingDocument => {
    const id = newBeadId()
    chosen.value = id
    return addBead(from, id)
  }

  const begin = (atom: number): void => {
    const start = document.value.beads.length === 0 ? newBead(document.value) : document.value
    stroke.value = start
    erasing = selected.value?.atoms.some((held) => held.atom === atom && held.unit === 0) ?? false
    paintOver(atom)
  }
  const paintOver = (atom: number): void => {
    if (stroke.value === null || selected.value === null) return
    stroke.value = erasing
      ? freeAtoms(stroke.value, [atom])
      : giveAtoms(stroke.value, selected.value.id, [atom])
  }
  const end = (): void => {
    if (stroke.value !== null) history.push(stroke.value)
    stroke.value = null
  }

  /** A change with the bead in hand, which is made when there is none. */
  const withBead = (change: (document: MappingDocument, bead: Bead) => MappingDocument): void => {
    const start = document.value.beads.length === 0 ? newBead(document.value) : document.value
    const bead = start.beads.find(({ id }) => id === chosen.value) ?? start.beads[0]
    history.push(change(start, bead))
  }
  const share = (atom: number): void =>
    withBead((from, bead) => {
      const holders = from.beads.filter((each) => each.atoms.some((held) => held.atom === atom))
      const ids = holders.map(({ id }) => id)
      if (!ids.includes(bead.id)) return shareAtom(from, atom, [...ids, bead.id])
      return ids.length === 1
        ? from
        : shareAtom(
            from,
            atom,
            ids.filter((id) => id !== bead.id),
          )
    })
  const weigh = (beadId: string, place: AtomPlace, weight: number): void => {
    const others = document.value.beads.flatMap(({ id, atoms }) =>
      id === beadId ? [] : atoms.filter(({ atom }) => atom === place.atom).map((held) => ({ id, held })),
    )
    const set = setShare(document.value, beadId, place, weight)
    history.push(
      others.length === 1 && weight < 1 ? setShare(set, others[0].id, others[0].held, 1 - weight) : set,
    )
  }
  const reach = (place: AtomPlace): void =>
    withBead((from, bead) => {
      const held = bead.atoms.some(({ atom, unit: at }) => atom === place.atom && at === place.unit)
      return held ? freeAtoms(from, [place.atom]) : giveAtomAcross(from, bead.id, place)
    })

  return {
    document,
    history,
    selected,
    select,
    stroke,
    begin,
    paintOver,
    end,
    drop: () => {
      stroke.value = null
    },
    add: () => history.push(newBead(document.value)),
    change: (beadId, change) => history.push(changeBead(document.value, beadId, change)),
    remove: (beadId) => history.push(removeBead(document.value, beadId)),
    give: (atoms, beadId) => history.push(giveAtoms(document.value, beadId, atoms)),
    share,
    weigh,
    reach,
    gather: (atoms) => withBead((from, bead) => giveAtoms(from, bead.id, atoms)),
    free: (atoms) => history.push(freeAtoms(document.value, atoms)),
    edit: (change) => history.push(change(document.value)),
    adopt: (from) => {
      const taken = renewBeadIds(from, `${newBeadId()}-`)
      chosen.value = taken.beads[0]?.id ?? null
      history.push(taken)
    },
  }
}

/** Never one that stood before, so that a term never passes to another bead by accident. */
function newBeadId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(6))
  return `b${Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('')}`
}
