/** Where the device keeps a page for writing in the book without a line. public/heap-book-worker.js knows it too. */
export const offlineBook = (house: string, heap: string) =>
  `/offline-book?house=${encodeURIComponent(house)}&heap=${encodeURIComponent(heap)}`;
