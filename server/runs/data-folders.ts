import { mkdir, open, rename, rm } from 'node:fs/promises';
import { dirname, join } from 'node:path';

/** Where octets lie: uploads that wait for a person, and the untouched files behind the runs. */
export type DataFolders = { staged: string; uploads: string };

export function dataFolders(dataDir: string): DataFolders {
  return { staged: join(dataDir, 'staged'), uploads: join(dataDir, 'uploads') };
}

/** At start: what was staged belongs to nobody any more. */
export async function openDataFolders(dataDir: string): Promise<DataFolders> {
  const folders = dataFolders(dataDir);
  await rm(folders.staged, { recursive: true, force: true });
  for (const folder of [folders.staged, folders.uploads]) {
    await mkdir(folder, { recursive: true, mode: 0o700 });
  }
  return folders;
}

/** Moves a file for good: it is on the disk under its new name when this returns. */
export async function moveDurably(from: string, to: string): Promise<void> {
  await flush(from);
  await rename(from, to);
  await flush(dirname(to));
}

async function flush(path: string): Promise<void> {
  const handle = await open(path, 'r');
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}
