/** The finding that is set aside, with the evidence it stood on when it was read. */
export interface DismissTarget {
  house: string;
  heap: string;
  title: string;
  evidence: { kind: string; mark: string; level: number };
}
