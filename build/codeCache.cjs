'use strict';
/**
 * `node codeCache.cjs FOLDER LINES` runs the command in FOLDER with each of the lines, lists of arguments as
 * JSON, as its launcher would, and leaves V8's code for all functions that ran in FOLDER/cli.cache.
 */
const { readFileSync, writeFileSync } = require('node:fs');
const { join } = require('node:path');
const { Script, constants } = require('node:vm');

const [, , folder, lines] = process.argv;
const rest = JSON.parse(lines);
const filename = join(folder, 'cli.cjs');
const script = new Script(readFileSync(filename, 'latin1'), {
  filename,
  importModuleDynamically: constants.USE_MAIN_CONTEXT_DEFAULT_LOADER,
});
process.on('exit', () => writeFileSync(join(folder, 'cli.cache'), script.createCachedData()));
// Emitted again whenever what was begun in it has come to its end.
process.on('beforeExit', next);
next();

function next() {
  const line = rest.shift();
  if (line === undefined) return;
  process.argv = [process.argv[0], filename, ...line];
  script.runInThisContext()(require, filename, folder);
}
