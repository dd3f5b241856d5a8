import type { MappingJson } from './mapping-json'

/** A mapping as lines for a person. */
export function mappingReport(json: MappingJson): string {
  const title = json.name === '' ? json.input.name : json.name
  return [
    `${title}: ${json.smiles}, ${json.formula}, ${json.mass.toFixed(3)} g/mol`,
    ...section('beads', ['name', 'type', 'formula', 'g/mol', 'site', 'atoms'], beadRows(json)),
    ...section('ends, closed by hydrogen', ['end', 'bead', 'formula', 'g/mol', ''], endRows(json)),
    ...section('terms', ['kind', 'name', 'per unit', '', ''], termRows(json)),
    ...listed(
      'places that differ',
      json.flags.map(({ detail }) => detail),
    ),
    ...listed(
      'terms that share a bond or a bead',
      json.groups.map(({ proposal }) => proposal),
    ),
    ...listed('degrees of freedom', json.use === '' ? [] : [json.use, ...numberLines(json)]),
    ...listed(
      'problems and notes',
      json.problems.map(
        ({ code, severity, title: what, detail }) => `${severity} ${code}: ${what}. ${detail}`,
      ),
    ),
    '',
  ].join('\n')
}

function beadRows({ beads }: MappingJson): string[][] {
  return beads.map(({ name, type, formula, mass, site, atoms }) => [
    name,
    type,
    formula,
    mass.toFixed(3),
    site,
    atoms
      .map(({ label, weight, offset }) => {
        const share = weight === 1 ? '' : `×${Number(weight.toFixed(3))}`
        return `${label}${share}${offset === 0 ? '' : `(${offset > 0 ? '+' : '−'}1)`}`
      })
      .join(' '),
  ])
}

function endRows({ ends }: MappingJson): string[][] {
  return ends.map(({ end, bead, formula, mass, missing, note }) => [
    end,
    bead,
    formula,
    mass.toFixed(3),
    [missing.length > 0 ? `without ${missing.join(' ')}` : '', note].filter((part) => part !== '').join('; '),
  ])
}

function termRows({ terms }: MappingJson): string[][] {
  return terms.map(({ kind, name, multiplicity, use, flagged }) => [
    kind,
    name,
    String(multiplicity),
    use,
    flagged ? 'pools places that differ' : '',
  ])
}

function numberLines({ numbers }: MappingJson): string[] {
  if (numbers === null) return []
  const { degreesKept, degreesBefore, reduction, heavyReduction, meanMass, gain, assumptions } = numbers
  return [
    `${degreesKept} of ${degreesBefore} degrees of freedom of the atoms are kept: ${reduction.toFixed(1)} atoms or ${heavyReduction.toFixed(1)} heavy atoms a bead, ${meanMass.toFixed(1)} g/mol.`,
    `Estimated gain in cost: about ${Number(gain.toPrecision(2))} times. ${assumptions.join(' ')}`,
  ]
}

function section(title: string, head: readonly string[], rows: readonly (readonly string[])[]): string[] {
  if (rows.length === 0) return []
  const widths = head.map((word, column) =>
    Math.max(...[word, ...rows.map((row) => row[column])].map((text) => text.length)),
  )
  const line = (row: readonly string[]): string =>
    `  ${row.map((text, column) => text.padEnd(widths[column])).join('  ')}`.trimEnd()
  return ['', title, line(head), ...rows.map(line)]
}

function listed(title: string, lines: readonly string[]): string[] {
  return lines.length === 0 ? [] : ['', title, ...lines.map((line) => `  ${line}`)]
}
