// node run-typescript.js PROGRAM: runs a TypeScript program of the tests, compiled as jest compiles it.
const Module = require('node:module');
const { resolve } = require('node:path');
const { transformFileSync } = require('@swc/core');
const { projects } = require('../../jest.config');

const project = resolve(__dirname, '../..');
const [, settings] = projects.find(({ displayName }) => displayName === 'server').transform['^.+\\.ts$'];

const resolveFilename = Module._resolveFilename;
Module._resolveFilename = function (request, ...rest) {
  return resolveFilename.call(this, request.replace(/^@shared\//, `${project}/shared/`), ...rest);
};
Module._extensions['.ts'] = (module, file) => {
  module._compile(transformFileSync(file, { ...settings, swcrc: false, configFile: false }).code, file);
};

require(resolve(process.argv[2]));
