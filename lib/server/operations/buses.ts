import { TestRead, TestReadCreate } from '@/lib/schema/bus';
import { operation } from '../operation';

export const createTestRead = operation({
  id: 'test-read.create',
  method: 'POST',
  path: '/houses/{house}/test-reads',
  action: 'wiring.write',
  summary: 'Ask for one reading of a board on Modbus; its answer is there within ten seconds',
  body: TestReadCreate,
  // it stores no reading and switches nothing
  unrecorded: true,
  answers: { 201: TestRead },
});
export const getTestRead = operation({
  id: 'test-read.get',
  method: 'GET',
  path: '/houses/{house}/test-reads/{testRead}',
  action: 'wiring.write',
  summary: 'What came of a test reading',
  answers: { 200: TestRead },
});
