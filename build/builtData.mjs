import { build } from 'esbuild';

/**
 * esbuild plugin: a module `name.built.ts` is run at build, and only its default export, plain data, gets
 * into the bundle. What it was made with stays outside.
 *
 * From the sources, under test, such a module simply runs.
 */
export function builtDataEsbuild() {
  return {
    name: 'built-data',
    setup({ onLoad }) {
      onLoad({ filter: /\.built\.ts$/ }, async ({ path }) => {
        const { outputFiles, metafile } = await build({
          entryPoints: [path],
          bundle: true,
          write: false,
          metafile: true,
          format: 'esm',
          platform: 'node',
          target: 'node20',
        });
        const address = `data:text/javascript;base64,${Buffer.from(outputFiles[0].contents).toString('base64')}`;
        const { default: data } = await import(address);
        return { contents: JSON.stringify(data), loader: 'json', watchFiles: Object.keys(metafile.inputs) };
      });
    },
  };
}
