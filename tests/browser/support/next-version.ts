import { readdir, readFile, rename, writeFile } from 'node:fs/promises';
import { extname, join } from 'node:path';

const TEXTS = ['.js', '.css', '.html', '.json'];
/** As the build names what it makes: `run-page-D3ujqpWx.js`. */
const HASHED = /^(.+)-([\w-]{8})(\.\w+)$/;

/**
 * Lays another build over one that is handed out: every file that has a hash in its name has another one, as after a
 * change to every source, and none under its old name is left.
 */
export async function layNextVersion(clientFolder: string): Promise<void> {
  const assets = join(clientFolder, 'assets');
  const names = (await readdir(assets)).filter((name) => HASHED.test(name));
  const nextOf = new Map(names.map((name) => [name, name.replace(HASHED, '$1-next$2$3')]));
  const oldNames = new RegExp(names.map(escape).join('|'), 'g');
  const texts = (await readdir(clientFolder, { recursive: true })).filter((name) =>
    TEXTS.includes(extname(name)),
  );
  for (const name of texts) {
    const path = join(clientFolder, name);
    const text = (await readFile(path, 'utf8')).replaceAll(
      oldNames,
      (old) => nextOf.get(old) ?? old,
    );
    await writeFile(path, marked(name, text));
  }
  for (const [old, next] of nextOf) await rename(join(assets, old), join(assets, next));
}

function marked(name: string, text: string): string {
  // The page is fetched anew where its revision is another.
  if (name === 'sw.js') return text.replace(/(url:"index\.html",revision:")\w{4}/, '$1next');
  if (name.startsWith('assets') && name.endsWith('.js')) {
    return `globalThis.fusekeeperVersion="next";${text}`;
  }
  return text;
}

function escape(name: string): string {
  return name.replace(/[.$]/g, '\\$&');
}
