/** Where the command writes: results to standard output, notes and errors to standard error. */
export interface Output {
  readonly print: (text: string) => void
  readonly note: (text: string) => void
}

/** Standard output and standard error of this process. */
export const processOutput: Output = {
  print: (text) => void process.stdout.write(text),
  note: (text) => void process.stderr.write(`${text}\n`),
}
