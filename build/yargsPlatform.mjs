import Parser from 'yargs-parser/browser';

/**
 * What yargs asks of its platform, for a command that has its own help, messages and language.
 *
 * Its usual platform takes longer to load than the rest of the program: tables of character widths for the
 * help, files of other languages, a search for the caller's package.json. None of it is reached with help
 * and version off and every flag declared; what would be reached by mistake throws.
 */
export default {
  Parser,
  assert: {
    strictEqual: (one, other) => insist(one === other, 'the same'),
    notStrictEqual: (one, other) => insist(one !== other, 'different'),
  },
  cliui: () => refuse('layout'),
  findUp: () => undefined,
  getCallerFile: () => refuse('caller'),
  getEnv: () => undefined,
  getProcessArgvBin: () => 'counterslope',
  inspect: String,
  mainFilename: '/',
  path: {
    basename: (path) => path,
    dirname: () => '/',
    extname: () => '',
    join: () => refuse('path'),
    relative: (_, path) => path,
    resolve: () => refuse('path'),
  },
  process: {
    argv: () => ['counterslope'],
    cwd: () => '/',
    emitWarning: (text) => refuse(text),
    execPath: () => '',
    exit: () => refuse('exit'),
    nextTick: (task) => queueMicrotask(task),
    stdColumns: null,
  },
  readFileSync: () => refuse('file'),
  readdirSync: () => refuse('folder'),
  require: () => refuse('module'),
  stringWidth: (text) => text.length,
  y18n: {
    __: (text) => text,
    __n: (one, many, count) => (count === 1 ? one : many),
    getLocale: () => 'en',
    setLocale: () => {},
    updateLocale: () => {},
  },
};

function insist(holds, what) {
  if (!holds) throw new Error(`expected ${what}`);
}

function refuse(what) {
  throw new Error(`yargs asked its platform for: ${what}`);
}
