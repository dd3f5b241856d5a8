import { Command, CommanderError } from 'commander'
import { InvalidInputError } from '../../shared/errors'
import { correlateCommand } from './correlate-command'
import { fitCommand } from './fit-command'
import { invertCommand } from './invert-command'
import { mappingCommand } from './mapping-command'
import { type Output, processOutput } from './output'
import { UsageError } from './usage-error'

/** Whatever is wrong with the call or the input. */
const EXIT_REFUSED = 2

const CLOSING = `
Tables go to standard output; guesses, notes and warnings to standard error. Whatever cannot be read is named with its
line, and the exit status is 2. A table is a model valid at one state point: validate it before you rely on it.
The JSON of the commands is described in docs/command-line.md.`

/**
 * The beadwright command.
 *
 * @param words what follows the command's name
 * @returns exit status: 0 done, 2 refused
 */
export async function run(words: readonly string[], output: Output = processOutput): Promise<number> {
  const program = new Command('beadwright')
    .description('Bonded distributions to tabulated potentials, on a terminal.')
    .addHelpText('after', CLOSING)
  for (const command of [
    program,
    invertCommand(output),
    fitCommand(output),
    correlateCommand(output),
    mappingCommand(output),
  ]) {
    command
      .exitOverride()
      .configureOutput({ writeOut: output.print, writeErr: (text) => output.note(text.trimEnd()) })
      .showHelpAfterError('(beadwright --help lists commands and options)')
    if (command !== program) program.addCommand(command)
  }
  try {
    await program.parseAsync(words, { from: 'user' })
    return 0
  } catch (error) {
    if (error instanceof CommanderError) return error.exitCode === 0 ? 0 : EXIT_REFUSED
    if (!(error instanceof UsageError) && !(error instanceof InvalidInputError)) throw error
    output.note(`beadwright: ${error.message}`)
    return EXIT_REFUSED
  }
}
