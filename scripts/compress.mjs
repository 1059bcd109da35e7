// Compresses what browsers are sent, once and as far as it goes, so that nobody waits for it while a page is opened.
import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';

/** Pictures and faces are small already. */
const TEXTS = new Set(['.js', '.css', '.json', '.svg', '.txt', '.map', '.html', '.xml']);

const WAYS = {
  br: (text) =>
    promisify(brotliCompress)(text, {
      params: {
        [constants.BROTLI_PARAM_QUALITY]: constants.BROTLI_MAX_QUALITY,
        [constants.BROTLI_PARAM_SIZE_HINT]: text.length,
      },
    }),
  gz: (text) => promisify(gzip)(text, { level: constants.Z_BEST_COMPRESSION }),
};

/** Writes NAME.br and NAME.gz beside each text under the folder, where they are smaller than it. */
export async function compressTexts(folder) {
  const files = readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && TEXTS.has(path.extname(entry.name)))
    .map((entry) => path.join(entry.parentPath, entry.name));
  await Promise.all(
    files.flatMap((file) => {
      const text = readFileSync(file);
      return Object.entries(WAYS).map(async ([ending, way]) => {
        const smaller = await way(text);
        if (smaller.length < text.length) writeFileSync(`${file}.${ending}`, smaller);
      });
    }),
  );
}
