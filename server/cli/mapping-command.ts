import { Command } from 'commander'
import { importMappingFile, type MappingFileError, readMappingFile } from '../../shared/documents'
import { mappingJson } from './mapping-json'
import { mappingReport } from './mapping-report'
import type { Output } from './output'
import { type Input, readInput } from './read-input'
import { withFileName } from './refused-file'
import { UsageError } from './usage-error'

/** `beadwright mapping`: what follows from a mapping file. */
export function mappingCommand(output: Output): Command {
  return new Command('mapping')
    .description('Derive beads, terms and checks from a mapping file.')
    .argument('<file>', 'mapping file (JSON, see docs/mapping-file.md); - for standard input')
    .option('--json', 'print JSON instead of a report')
    .action(async (file: string, { json }: { json?: boolean }) => {
      let input: Input | null = null
      withFileName(file, () => (input = readInput(file)))
      if (input !== null) output.print(await described(input, json ?? false))
    })
}

async function described(input: Input, asJson: boolean): Promise<string> {
  const reading = readMappingFile(input.text)
  if (!reading.ok) throw refused(input, reading.errors)
  const mapping = await importMappingFile(reading.file)
  if (!mapping.ok) throw refused(input, mapping.errors)
  const json = mappingJson(mapping, input)
  return asJson ? `${JSON.stringify(json, null, 2)}\n` : mappingReport(json)
}

/** Every error on a line of its own: the file, the place in it, what is wrong, the code. */
function refused({ name }: Input, errors: readonly MappingFileError[]): UsageError {
  const lines = errors.map(
    ({ code, message, path }) => `${name}: ${path === '' ? '' : `${path}: `}${message} (${code})`,
  )
  return new UsageError(lines.join('\n'))
}
