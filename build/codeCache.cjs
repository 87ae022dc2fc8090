'use strict';
/**
 * `node codeCache.cjs FOLDER ARGUMENTS…` runs the command in FOLDER with the arguments, as its launcher
 * would, and leaves V8's code for all functions that ran in FOLDER/cli.cache.
 */
const { readFileSync, writeFileSync } = require('node:fs');
const { join } = require('node:path');
const { Script, constants } = require('node:vm');

const [, , folder, ...argv] = process.argv;
const filename = join(folder, 'cli.cjs');
const script = new Script(readFileSync(filename, 'latin1'), {
  filename,
  importModuleDynamically: constants.USE_MAIN_CONTEXT_DEFAULT_LOADER,
});
process.argv = [process.argv[0], filename, ...argv];
process.on('exit', () => writeFileSync(join(folder, 'cli.cache'), script.createCachedData()));
script.runInThisContext()(require, filename, folder);
