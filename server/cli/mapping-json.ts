import { formulaText, type RepeatUnit } from '../../shared/chemistry'
import {
  beadComposition,
  beadMass,
  checkMapping,
  deriveTerms,
  endBeads,
  estimateGain,
  hasTooManyPlaces,
  type MappingDocument,
  mappingNumbers,
  type MappingProblem,
  multiplicity,
  placeFlags,
  proposeTerms,
  termGroups,
  termUse,
} from '../../shared/mapping'

/** What `mapping --json` prints; masses in g/mol, beads by their names. */
export interface MappingJson {
  readonly name: string
  readonly smiles: string
  readonly formula: string
  readonly mass: number
  readonly input: { readonly name: string; readonly sha256: string }
  readonly beads: readonly {
    readonly name: string
    readonly type: string
    readonly site: string
    readonly atoms: readonly { readonly label: string; readonly weight: number; readonly offset: number }[]
    readonly formula: string
    readonly mass: number
  }[]
  readonly ends: readonly {
    readonly end: string
    readonly bead: string
    readonly formula: string
    readonly mass: number
    readonly missing: readonly string[]
    readonly note: string
  }[]
  readonly terms: readonly {
    readonly kind: string
    readonly name: string
    readonly multiplicity: number
    readonly use: 'used' | 'left out'
    /** Its places differ in their surroundings and are pooled. */
    readonly flagged: boolean
  }[]
  readonly flags: readonly {
    readonly name: string
    readonly choice: string | null
    readonly detail: string
  }[]
  readonly groups: readonly {
    readonly kind: string
    readonly centre: string
    readonly terms: readonly string[]
    readonly places: number
    readonly degrees: number
    readonly proposal: string
  }[]
  readonly use: string
  readonly numbers: {
    readonly beads: number
    readonly degreesKept: number
    readonly degreesBefore: number
    readonly reduction: number
    readonly heavyReduction: number
    readonly meanMass: number
    readonly gain: number
    readonly assumptions: readonly string[]
  } | null
  readonly problems: readonly Pick<MappingProblem, 'code' | 'severity' | 'title' | 'detail'>[]
}

/** The JSON of a mapping. Terms, flags and groups are empty where the terms stand at too many places, which is a problem. */
export function mappingJson(
  { name, unit, document }: { name: string; unit: RepeatUnit; document: MappingDocument },
  input: { readonly name: string; readonly sha256: string },
): MappingJson {
  const { smiles, formula, mass } = unit
  const problems = checkMapping(unit, document).map(({ code, severity, title, detail }) => ({
    code,
    severity,
    title,
    detail,
  }))
  return {
    name,
    smiles,
    formula,
    mass,
    input: { name: input.name, sha256: input.sha256 },
    beads: beadRows(unit, document),
    ends: endRows(unit, document),
    ...termParts(unit, document),
    numbers: numbersOf(unit, document),
    problems,
  }
}

function beadRows(unit: RepeatUnit, document: MappingDocument): MappingJson['beads'] {
  return document.beads.map((bead) => ({
    name: bead.name,
    type: bead.type,
    site: bead.site.rule === 'atom' ? unit.atoms[bead.site.atom].label : bead.site.rule,
    atoms: bead.atoms.map(({ atom, weight, unit: offset }) => ({
      label: unit.atoms[atom].label,
      weight,
      offset,
    })),
    formula: formulaText(beadComposition(unit, bead)),
    mass: beadMass(unit, bead),
  }))
}

function endRows(unit: RepeatUnit, document: MappingDocument): MappingJson['ends'] {
  const names = new Map(document.beads.map(({ id, name }) => [id, name]))
  return endBeads(unit, document).map(({ end, bead, composition, mass, missing, note }) => ({
    end,
    bead: names.get(bead) as string,
    formula: formulaText(composition),
    mass,
    missing: missing.map((atom) => unit.atoms[atom].label),
    note,
  }))
}

function termParts(
  unit: RepeatUnit,
  document: MappingDocument,
): Pick<MappingJson, 'terms' | 'flags' | 'groups' | 'use'> {
  if (hasTooManyPlaces(unit, document)) return { terms: [], flags: [], groups: [], use: '' }
  const terms = deriveTerms(unit, document)
  const { used, sentence } = termUse(unit, document, terms)
  const proposals = proposeTerms(unit, document, termGroups(unit, document, terms))
  return {
    terms: terms.map((term) => ({
      kind: term.kind,
      name: term.name,
      multiplicity: multiplicity(term),
      use: used.includes(term) ? 'used' : 'left out',
      flagged: new Set(term.placeClasses).size > 1,
    })),
    flags: placeFlags(unit, document).map(({ name, choice, detail }) => ({ name, choice, detail })),
    groups: proposals.map(({ group, sentence: proposal }) => ({
      kind: group.kind,
      centre: group.centre,
      terms: group.terms.map(({ term }) => term.name),
      places: group.places,
      degrees: group.degrees,
      proposal,
    })),
    use: sentence,
  }
}

function numbersOf(unit: RepeatUnit, document: MappingDocument): MappingJson['numbers'] {
  const numbers = mappingNumbers(unit, document)
  if (numbers === null) return null
  const { beads, degreesKept, degreesBefore, reduction, heavyReduction, meanMass } = numbers
  const gain = estimateGain(reduction)
  return {
    ...{ beads, degreesKept, degreesBefore, reduction, heavyReduction, meanMass },
    gain: gain.total,
    assumptions: gain.sentences,
  }
}
