import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { makeSampleLogs } from './heat-model/sample-logs.ts';

const folder = join(import.meta.dirname, '../../sample-logs');
await mkdir(folder, { recursive: true });
for (const { name, bytes } of makeSampleLogs()) {
  await writeFile(join(folder, name), bytes);
  console.log(`${name} ${bytes.length} bytes`);
}
