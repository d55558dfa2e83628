// npm run bench [-- NAME]: the benchmarks, against a database that writes as safely as the one lived with.
const { spawn } = require('node:child_process');
const { once } = require('node:events');
const { ensureBuilt, serverBuild } = require('./builds');
const { requireSupportedNode } = require('./node-version');
const { ensurePackages } = require('./packages');
const { projectFolder } = require('./project');
const { runScript } = require('./run-script');
const { testDatabase } = require('./test-database');

void runScript(async (context) => {
  const { signal, log } = context;
  requireSupportedNode();
  await ensurePackages({ log, signal });
  await ensureBuilt([serverBuild], { log, signal });
  const { url, psql } = await testDatabase('bench', context);
  const child = spawn(process.execPath, ['dist/test/bench/main.js', ...process.argv.slice(2)], {
    cwd: projectFolder,
    env: { ...process.env, TEST_DATABASE_URL: url, PSQL: psql },
    signal,
    stdio: 'inherit',
  });
  const [code] = await once(child, 'close');
  return code ?? 1;
});
