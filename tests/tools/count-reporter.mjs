/** Ends a test run with one plain line: how many tests passed and how many failed. */
export default class CountReporter {
  onTestRunEnd(modules, errors) {
    let [passed, failed] = [0, errors.length];
    for (const module of modules) {
      if (module.state() === 'failed' && [...module.children.allTests()].length === 0) failed += 1;
      for (const test of module.children.allTests()) {
        const { state } = test.result();
        if (state === 'passed') passed += 1;
        else if (state === 'failed') failed += 1;
      }
    }
    process.stdout.write(`${passed} passed, ${failed} failed\n`);
  }
}
