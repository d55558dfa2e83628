/** Sends the process that runs jest how many tests passed and failed. */
class CountingReporter {
  /**
   * @param {unknown} _contexts
   * @param {import('@jest/reporters').AggregatedResult} results
   */
  onRunComplete(_contexts, results) {
    process.send?.({
      passed: results.numPassedTests,
      // A file that cannot even be loaded has no tests to count, but it has failed.
      failed: results.numFailedTests + results.numRuntimeErrorTestSuites,
    });
  }
}

module.exports = CountingReporter;
