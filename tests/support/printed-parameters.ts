/** The parameters of a form as the comment lines of a table print them, by name. */
export const printedParameters = (text: string): Readonly<Record<string, number>> => {
  const line = /parameters: (.*)/.exec(text)?.[1]
  if (line === undefined) throw new Error('The table names no parameters.')
  return Object.fromEntries(
    line.split('; ').map((part) => {
      const [name, value] = part.split(' = ')
      return [name, Number(value.split(' ')[0])]
    }),
  )
}
