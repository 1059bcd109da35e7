/** The browser's end of the live feed: one socket, kept alive. Knows nothing of React. */
import type { LiveAsk, LiveFrame } from '@/lib/live/frames';

/** Codes with which the worker closes for good: signed out, not allowed, no such house (lib/live/frames). */
const FOR_GOOD = [4401, 4403, 4404];
const OPEN_WITHIN_MS = 5000;
const WAIT_MOST_MS = 10_000;

export interface FeedEvents {
  frame: (frame: LiveFrame) => void;
  /** `closed` comes with the code where the worker closed for good. */
  link: (is: 'live' | 'lost' | { closed: number }) => void;
}

/**
 * Joins the feed of a house, and joins it again whenever it is lost: after half a second, then twice as long each time,
 * with jitter, so that a restarted worker is not met by all browsers at once.
 * @param ask what is said first on each connection
 * @returns a function that leaves
 */
export function joinFeed(houseId: string, events: FeedEvents, ask?: LiveAsk): () => void {
  let socket: WebSocket | null = null;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let tries = 0;
  let left = false;

  const again = () => {
    if (left) return;
    const wait = Math.min(WAIT_MOST_MS, 500 * 2 ** tries) * (0.5 + Math.random());
    tries += 1;
    clearTimeout(timer);
    timer = setTimeout(join, wait);
  };

  const join = () => {
    const scheme = window.location.protocol === 'https:' ? 'wss' : 'ws';
    const one = new WebSocket(
      `${scheme}://${window.location.host}/live?house=${encodeURIComponent(houseId)}`,
    );
    socket = one;
    const slow = setTimeout(() => one.close(), OPEN_WITHIN_MS);
    one.onopen = () => {
      clearTimeout(slow);
      tries = 0;
      if (ask !== undefined) one.send(JSON.stringify(ask));
      events.link('live');
    };
    one.onmessage = (message) => {
      const frame = readFrame(String(message.data));
      if (frame !== null) events.frame(frame);
    };
    one.onclose = ({ code }) => {
      clearTimeout(slow);
      if (left || socket !== one) return;
      if (FOR_GOOD.includes(code)) return events.link({ closed: code });
      events.link('lost');
      again();
    };
  };

  // a phone that wakes must not wait out the pause of its sleep
  const wake = () => {
    if (document.visibilityState !== 'visible' || socket?.readyState === WebSocket.OPEN) return;
    tries = 0;
    clearTimeout(timer);
    socket?.close();
    join();
  };

  join();
  document.addEventListener('visibilitychange', wake);
  window.addEventListener('online', wake);
  return () => {
    left = true;
    clearTimeout(timer);
    document.removeEventListener('visibilitychange', wake);
    window.removeEventListener('online', wake);
    socket?.close();
  };
}

/**
 * Not put through its schema: zod would be a third of Watch's script, and the frame comes from our own worker on our own
 * origin. A kind that this release does not know is left.
 */
function readFrame(text: string): LiveFrame | null {
  try {
    const frame: unknown = JSON.parse(text);
    const isFrame = typeof frame === 'object' && frame !== null && 'type' in frame;
    return isFrame && ['state', 'switching', 'alarms', 'plan', 'tail'].includes(String(frame.type))
      ? (frame as LiveFrame)
      : null;
  } catch {
    return null;
  }
}
