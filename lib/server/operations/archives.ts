import { Archive, ArchiveBring, ArchiveList, ArchiveSend, InService } from '@/lib/schema/archive';
import { LARGEST_PIECE, PieceQuery } from '@/lib/schema/import';
import { House } from '@/lib/schema/yard-view';
import { operation } from '../operation';

export const listArchives = operation({
  id: 'archive.list',
  method: 'GET',
  path: '/archives',
  action: 'holding.archive',
  summary: 'Archives of the whole holding that went out or came in, newest first',
  answers: { 200: ArchiveList },
});
export const makeArchive = operation({
  id: 'archive.make',
  method: 'POST',
  path: '/archives/out',
  action: 'holding.archive',
  summary: 'Ask for an archive of the whole holding; its file is fetched then',
  answers: { 201: Archive },
});
export const sendArchive = operation({
  id: 'archive.send',
  method: 'POST',
  path: '/archives/in',
  action: 'holding.archive',
  summary: 'Announce the file of an archive; its bytes follow in pieces',
  body: ArchiveSend,
  answers: { 201: Archive },
});
export const getArchive = operation({
  id: 'archive.get',
  method: 'GET',
  path: '/archives/{archive}',
  action: 'holding.archive',
  summary: 'How far an archive is, and what was found in it',
  answers: { 200: Archive },
});
export const fetchArchive = operation({
  id: 'archive.fetch',
  method: 'GET',
  path: '/archives/{archive}/file',
  action: 'holding.archive',
  summary: 'The whole holding as one zip, made while it is sent (docs/archive.md)',
  answers: {},
  onlyAnswers: 'application/zip',
});
export const sendArchivePiece = operation({
  id: 'archive.piece',
  method: 'PUT',
  path: '/archives/{archive}/piece',
  action: 'holding.archive',
  summary: 'A piece of the file, at most 4 MiB, where the one before ended; sent again it does no harm',
  query: PieceQuery,
  takes: { types: ['application/octet-stream'], mostBytes: LARGEST_PIECE },
  unrecorded: true,
  answers: { 200: Archive },
});
export const bringArchive = operation({
  id: 'archive.bring',
  method: 'POST',
  path: '/archives/{archive}/bring',
  action: 'holding.archive',
  summary: 'Bring an archive that was looked through in as a new holding, beside every other',
  body: ArchiveBring,
  answers: { 200: Archive },
});
export const dropArchive = operation({
  id: 'archive.drop',
  method: 'DELETE',
  path: '/archives/{archive}',
  action: 'holding.archive',
  summary: 'Cancel it, or take it off the list; a holding that was made of it stays',
  answers: { 204: null },
});
export const putInService = operation({
  id: 'house.in-service',
  method: 'POST',
  path: '/houses/{house}/in-service',
  action: 'holding.archive',
  summary: 'Put a house that came out of an archive in service: from then on its rules decide',
  body: InService,
  answers: { 200: House },
});
