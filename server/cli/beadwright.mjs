#!/usr/bin/env node
import { tsImport } from 'tsx/esm/api'

const { run } = await tsImport('./main.ts', import.meta.url)
process.exitCode = await run(process.argv.slice(2))
