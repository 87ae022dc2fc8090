#!/usr/bin/env node
'use strict';
const { readFileSync, writeSync } = require('node:fs');
const { join } = require('node:path');

const argv = process.argv.slice(2);
// Help and version are the same on every machine: answered without loading the program.
if (argv.length > 2 || !answer(JSON.parse(readFileSync(join(__dirname, 'answers.json'), 'utf8')))) start();

function answer(answers) {
  const key = argv.join('\n');
  if (!Object.hasOwn(answers, key)) return false;
  const { stdout, stderr, exitCode } = answers[key];
  process.exitCode = exitCode;
  say(1, stdout);
  say(2, stderr);
  return true;
}

/** Written at once; a stream of the process costs several milliseconds to set up. */
function say(target, text) {
  let rest = Buffer.from(text);
  try {
    while (rest.length > 0) rest = rest.subarray(writeSync(target, rest));
  } catch (error) {
    // A reader that has seen enough is no error.
    if (error.code === 'EPIPE') return;
    // A pipe that is full for now, or a disk that is: the stream waits, or reports as the program does.
    if (error.code === 'EAGAIN') (target === 1 ? process.stdout : process.stderr).write(rest);
    else process.exitCode = 3;
  }
}

function start() {
  const { Script, constants } = require('node:vm');
  const filename = join(__dirname, 'cli.cjs');
  const script = new Script(readFileSync(filename, 'latin1'), {
    filename,
    cachedData: readCodeCache(),
    importModuleDynamically: constants.USE_MAIN_CONTEXT_DEFAULT_LOADER,
  });
  script.runInThisContext()(require, __filename, __dirname);
}

/** Made at build by that machine's Node; V8 refuses it, and compiles, under any other. */
function readCodeCache() {
  try {
    return readFileSync(join(__dirname, 'cli.cache'));
  } catch {
    return undefined;
  }
}
