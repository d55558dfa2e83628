// npm test [-- jest's own options]: all tests, with the database and the browser that they need.
const { countsLine, runJest } = require('./jest-run');
const { ensureBuilt, serverBuild, webBuild } = require('./builds');
const { ensureChromium } = require('./chromium');
const { ensureProgram, nginx, systemdAnalyze } = require('./debian-program');
const { requireSupportedNode } = require('./node-version');
const { ensurePackages } = require('./packages');
const { Problem } = require('./problem');
const { runScript } = require('./run-script');
const { needsOf, selectedTests } = require('./test-selection');
const { testDatabase } = require('./test-database');

const args = process.argv.slice(2);

void runScript(async (context) => {
  const { signal, defer, log } = context;
  let counts = { passed: 0, failed: 0 };
  defer(() => log(countsLine(counts))); // undone last, so it is the last line
  requireSupportedNode();
  await ensurePackages({ log, signal });
  const needs = needsOf(await selectedTests(args, signal));
  const env = { ...process.env };
  delete env['DATABASE_URL']; // what is lived with is out of the tests' reach
  if (needs.database) {
    const { url, applicationUrl } = await testDatabase('test', context);
    env['TEST_DATABASE_URL'] = url;
    env['TEST_APPLICATION_DATABASE_URL'] ??= applicationUrl;
  }
  if (needs.browser) env['CHROMIUM_PATH'] = await ensureChromium({ log, signal });
  if (needs.proxy) {
    env['NGINX_PATH'] = await ensureProgram(nginx, { log, signal });
    env['SYSTEMD_ANALYZE_PATH'] = await ensureProgram(systemdAnalyze, { log, signal });
  }
  if (needs.builds) await ensureBuilt([serverBuild, webBuild], { log, signal });
  const result = await runJest(args, env, signal);
  counts = result.counts;
  if (counts.passed + counts.failed === 0) throw new Problem('No test ran.');
  return result.exitCode;
});
