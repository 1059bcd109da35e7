/**
 * What a query cannot do for a reason that the asker can mend: a name that is not there, or a state that forbids it.
 * The interface answers 422 at the path, or 409.
 */
export class Refusal extends Error {
  override readonly name = 'Refusal';
  /** @param path dotted path in the body; null when the state, not the body, is in the way */
  constructor(
    readonly path: string | null,
    message: string,
  ) {
    super(message);
  }
}
