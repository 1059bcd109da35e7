/** What the browser asks the interface while it follows a house. */

export async function ask<Answer>(path: string): Promise<Answer> {
  const response = await fetch(`/api/v1${path}`, { headers: { accept: 'application/json' } });
  // health answers 503 with the very body that is asked for
  if (!response.ok && response.status !== 503) throw new Error(`${path} answered ${response.status}`);
  return (await response.json()) as Answer;
}

export interface Control {
  worker: { up: boolean };
}

/**
 * Whether a worker leads. Its heartbeat tells, but only after some seconds of silence; while the feed is lost, the door
 * tells at once: it answers for a worker that is away.
 */
export async function askControl(isLive: boolean): Promise<Control> {
  if (!isLive) {
    const answer = await fetch('/live', { headers: { accept: 'application/json' } });
    if (answer.status === 502 || answer.status === 503) return { worker: { up: false } };
  }
  return ask('/health');
}
