import { listOf } from '@/lib/schema/common';
import {
  Proof,
  ProofBegin,
  ProofGiveUp,
  ProofPicture,
  ProofPictureQuery,
  ProofPictureSend,
  ProofQuery,
  ProofRunOrder,
  ProofStepTake,
} from '@/lib/schema/proof';
import { operation } from '../operation';

export const listProofs = operation({
  id: 'proof.list',
  method: 'GET',
  path: '/houses/{house}/proofs',
  action: 'holding.see',
  summary: 'Proofs of channels, newest first',
  query: ProofQuery,
  answers: { 200: listOf(Proof) },
});
export const beginProof = operation({
  id: 'proof.begin',
  method: 'POST',
  path: '/houses/{house}/proofs',
  action: 'channel.prove',
  summary: 'Begin to prove a channel; one that goes on is answered as it stands (200)',
  body: ProofBegin,
  answers: { 201: Proof, 200: Proof },
});
export const getProof = operation({
  id: 'proof.get',
  method: 'GET',
  path: '/houses/{house}/proofs/{proof}',
  action: 'holding.see',
  summary: 'One proof: its steps, what is done, and what was seen of its runs',
  answers: { 200: Proof },
});
export const takeStep = operation({
  id: 'proof.step',
  method: 'POST',
  path: '/houses/{house}/proofs/{proof}/steps',
  action: 'channel.prove',
  summary: 'Take a step; out of turn, or against what was seen, it is refused (409)',
  body: ProofStepTake,
  answers: { 200: Proof },
});
export const orderRun = operation({
  id: 'proof.run',
  method: 'POST',
  path: '/houses/{house}/proofs/{proof}/runs',
  action: 'channel.prove',
  summary: 'Run the load for a time; it ends by itself',
  body: ProofRunOrder,
  answers: { 200: Proof },
});
export const stopRun = operation({
  id: 'proof.stop',
  method: 'DELETE',
  path: '/houses/{house}/proofs/{proof}/runs',
  action: 'channel.prove',
  summary: 'End the run that goes on',
  answers: { 200: Proof },
});
export const finishProof = operation({
  id: 'proof.finish',
  method: 'POST',
  path: '/houses/{house}/proofs/{proof}/finish',
  action: 'channel.prove',
  summary: 'All steps are done: the channel is proved',
  answers: { 200: Proof },
});
export const giveUpProof = operation({
  id: 'proof.give-up',
  method: 'POST',
  path: '/houses/{house}/proofs/{proof}/give-up',
  action: 'channel.prove',
  summary: 'Give a proof up; it stays on record as far as it went',
  body: ProofGiveUp,
  answers: { 200: Proof },
});
export const addPicture = operation({
  id: 'proof.photograph',
  method: 'POST',
  path: '/houses/{house}/proofs/{proof}/photographs',
  action: 'channel.prove',
  summary:
    'A photograph of the plate or the wiring, as its bytes; kept without place, camera and other hidden words',
  query: ProofPictureSend,
  takes: { types: ['image/jpeg', 'image/png', 'image/webp'], mostBytes: 10 * 1024 ** 2 },
  answers: { 201: ProofPicture },
});
export const getPicture = operation({
  id: 'proof.photograph-get',
  method: 'GET',
  path: '/houses/{house}/proof-photographs/{picture}',
  action: 'holding.see',
  summary: 'One photograph of a proof, whole or small, as JPEG',
  query: ProofPictureQuery,
  answers: {},
  onlyAnswers: 'image/jpeg',
});
export const removePicture = operation({
  id: 'proof.photograph-remove',
  method: 'DELETE',
  path: '/houses/{house}/proof-photographs/{picture}',
  action: 'channel.prove',
  summary: 'Take a photograph out of a proof that goes on',
  answers: { 204: null },
});
