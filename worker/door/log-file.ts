import { appendFileSync, existsSync, mkdirSync, renameSync, statSync } from 'node:fs';
import path from 'node:path';

/** At this size a log is set aside as `.old`, over the one before, so a part keeps two files at most. */
const LIMIT_BYTES = 20 * 1024 * 1024;

export interface Log {
  readonly path: string;
  write: (chunk: Buffer) => void;
}

/** A child's log, which cannot fill the disk however long the child runs. */
export class LogFile implements Log {
  readonly path: string;
  private size: number;

  constructor(folder: string, name: string) {
    mkdirSync(folder, { recursive: true, mode: 0o700 });
    this.path = path.join(folder, `${name}.log`);
    this.size = existsSync(this.path) ? statSync(this.path).size : 0;
  }

  write(chunk: Buffer): void {
    try {
      if (this.size + chunk.length > LIMIT_BYTES) {
        renameSync(this.path, `${this.path}.old`);
        this.size = 0;
      }
      appendFileSync(this.path, chunk, { mode: 0o600 });
      this.size += chunk.length;
    } catch {
      // a full disk must not end the process that keeps the others alive; what is lost is lines of a log
    }
  }
}
