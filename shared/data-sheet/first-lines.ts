/** Lines of comments and of rows that a sheet shows. */
const SHOWN = { comments: 5, rows: 3, letters: 96 } as const

/** What a file looks like: its first comments, the line above the rows, the first rows and the last; … for what lies between. */
export function firstLines(text: string): string[] {
  const lines = text.split(/\r?\n/).filter((line) => line.trim() !== '')
  const first = lines.findIndex((line) => /^\s*[-+.\d]/.test(line))
  if (first < 0) return lines.slice(0, SHOWN.comments + SHOWN.rows).map(shortened)
  const [above, rows] = [lines.slice(0, first), lines.slice(first)]
  const comments =
    above.length > SHOWN.comments + 1
      ? [...above.slice(0, SHOWN.comments), '…', above[above.length - 1]]
      : above
  const last =
    rows.length > SHOWN.rows ? [...(rows.length > SHOWN.rows + 1 ? ['…'] : []), rows[rows.length - 1]] : []
  return [...comments, ...rows.slice(0, SHOWN.rows), ...last].map(shortened)
}

function shortened(line: string): string {
  return line.length > SHOWN.letters ? `${line.slice(0, SHOWN.letters - 1)}…` : line
}
