import type { Reporter, SerializedError, TestModule, TestRunEndReason } from 'vitest/node'

/**
 * Prints `N passed, N failed` as the last line of the run. A skipped test counts as failed, and so does a file that did
 * not load, an unhandled error and a run without tests.
 */
export default class ClosingLineReporter implements Reporter {
  onTestRunEnd(
    modules: readonly TestModule[],
    errors: readonly SerializedError[],
    reason: TestRunEndReason,
  ): void {
    let passed = 0
    let failed = errors.length
    for (const module of modules) {
      let failedHere = 0
      for (const test of module.children.allTests()) {
        if (test.result().state === 'passed') passed++
        else failedHere++
      }
      if (module.state() === 'failed' && failedHere === 0) failedHere = 1
      failed += failedHere
    }
    if ((reason === 'failed' || passed === 0) && failed === 0) failed = 1
    if (failed > 0) process.exitCode = 1
    // After everything the default reporter still has to say.
    process.once('exit', () => process.stdout.write(`${passed} passed, ${failed} failed\n`))
  }
}
