import { SwitchingsExport, ReadingsExport, HeapBookExport } from '@/lib/schema/export';
import {
  Import,
  ImportCreate,
  ImportLayout,
  ImportList,
  ImportPreview,
  LARGEST_PIECE,
  PieceQuery,
  PreviewAsk,
} from '@/lib/schema/import';
import { operation } from '../operation';

export const listImports = operation({
  id: 'import.list',
  method: 'GET',
  path: '/houses/{house}/imports',
  action: 'holding.see',
  summary: "Loggers' files that were brought in, newest first",
  answers: { 200: ImportList },
});
export const createImport = operation({
  id: 'import.create',
  method: 'POST',
  path: '/houses/{house}/imports',
  action: 'import.write',
  summary: 'Announce a file; its bytes follow in pieces',
  body: ImportCreate,
  answers: { 201: Import },
});
export const getImport = operation({
  id: 'import.get',
  method: 'GET',
  path: '/houses/{house}/imports/{import}',
  action: 'holding.see',
  summary: 'How far an import is',
  answers: { 200: Import },
});
export const sendPiece = operation({
  id: 'import.piece',
  method: 'PUT',
  path: '/houses/{house}/imports/{import}/piece',
  action: 'import.write',
  summary: 'A piece of the file, at most 4 MiB, where the one before ended; sent again it does no harm',
  query: PieceQuery,
  takes: { types: ['application/octet-stream'], mostBytes: LARGEST_PIECE },
  unrecorded: true,
  answers: { 200: Import },
});
export const previewImport = operation({
  id: 'import.preview',
  method: 'POST',
  path: '/houses/{house}/imports/{import}/preview',
  action: 'import.write',
  summary: 'The first lines as they are understood, or as a layout would have them',
  body: PreviewAsk,
  unrecorded: true,
  answers: { 200: ImportPreview },
});
export const checkImport = operation({
  id: 'import.check',
  method: 'PUT',
  path: '/houses/{house}/imports/{import}/layout',
  action: 'import.write',
  summary: 'Look the whole file through by a layout; nothing is written yet',
  body: ImportLayout,
  answers: { 200: Import },
});
export const bringImport = operation({
  id: 'import.bring',
  method: 'POST',
  path: '/houses/{house}/imports/{import}/bring',
  action: 'import.write',
  summary: 'Bring in the readings of a file that was looked through',
  answers: { 200: Import },
});
export const takeBackImport = operation({
  id: 'import.take-back',
  method: 'DELETE',
  path: '/houses/{house}/imports/{import}',
  action: 'import.write',
  summary: 'Cancel an import, or take it back: only the readings that it brought go',
  answers: { 200: Import, 204: null },
});
export const getImportFaults = operation({
  id: 'import.faults',
  method: 'GET',
  path: '/houses/{house}/imports/{import}/faults',
  action: 'holding.see',
  summary: 'The lines that could not be read, and why',
  answers: {},
  onlyAnswers: 'text/csv',
});
export const exportReadings = operation({
  id: 'export.readings',
  method: 'GET',
  path: '/houses/{house}/export/readings',
  action: 'holding.see',
  summary: 'Readings as CSV, a line a time, corrected by the calibration of their time',
  query: ReadingsExport,
  answers: {},
  onlyAnswers: 'text/csv',
});
export const exportSwitchings = operation({
  id: 'export.switchings',
  method: 'GET',
  path: '/houses/{house}/export/switchings',
  action: 'holding.see',
  summary: 'Switchings as CSV, newest first',
  query: SwitchingsExport,
  answers: {},
  onlyAnswers: 'text/csv',
});
export const exportRuns = operation({
  id: 'export.runs',
  method: 'GET',
  path: '/houses/{house}/export/runs',
  action: 'holding.see',
  summary: 'What each load did and when, as CSV, with its power, flow and loop',
  query: SwitchingsExport,
  answers: {},
  onlyAnswers: 'text/csv',
});
export const exportHeapBook = operation({
  id: 'export.heap-book',
  method: 'GET',
  path: '/houses/{house}/export/heap-book',
  action: 'holding.see',
  summary: 'The heap book as CSV, newest first',
  query: HeapBookExport,
  answers: {},
  onlyAnswers: 'text/csv',
});
export const exportProbeRounds = operation({
  id: 'export.probe-rounds',
  method: 'GET',
  path: '/houses/{house}/export/probe-rounds',
  action: 'holding.see',
  summary:
    'Rounds with the probe as CSV, a line a place, newest first; column and row count from 1 at the top left',
  query: HeapBookExport,
  answers: {},
  onlyAnswers: 'text/csv',
});
