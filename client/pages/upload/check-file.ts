import { MAX_UPLOAD_BYTES } from '#shared/reading/log-reading.ts';

const BYTES_PER_MB = 1024 * 1024;
const READABLE = /\.(csv|txt)$/i;

/** A size as people say it: "312 kB", "1.4 MB", "131 MB"; rounded up, so that too big never reads as just right. */
export function sayBytes(bytes: number): string {
  if (bytes < 1024) return `${bytes} bytes`;
  if (bytes < BYTES_PER_MB) return `${Math.ceil(bytes / 1024)} kB`;
  const tenths = Math.ceil((bytes / BYTES_PER_MB) * 10) / 10;
  return `${tenths} MB`;
}

/**
 * What is wrong with a picked file, seen from its name and size alone; null where it may be sent.
 * The server checks the same again, and the bytes as well.
 */
export function checkFile(file: { name: string; size: number } | undefined): string | null {
  if (!file) return 'Select a probe file';
  if (!READABLE.test(file.name)) {
    return `The selected file must be a .csv or .txt. You gave “${file.name}”.`;
  }
  if (file.size === 0) return `The selected file is empty. You gave “${file.name}”.`;
  if (file.size > MAX_UPLOAD_BYTES) {
    return `The selected file must be ${sayBytes(MAX_UPLOAD_BYTES)} or smaller. “${file.name}” is ${sayBytes(file.size)}.`;
  }
  return null;
}
