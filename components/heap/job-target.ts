export interface JobTarget {
  house: string;
  heap: string;
  /** YYYY-MM-DD in the house's zone. */
  today: string;
}
