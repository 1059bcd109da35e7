import { Training, TrainingOrder } from '@/lib/schema/training';
import { operation } from '../operation';

export const getTraining = operation({
  id: 'training.get',
  method: 'GET',
  path: '/houses/{house}/training',
  action: 'holding.see',
  summary: 'Faults for training that stand in the simulated yard',
  answers: { 200: Training },
});
export const orderTraining = operation({
  id: 'training.order',
  method: 'POST',
  path: '/houses/{house}/training',
  action: 'wiring.write',
  summary: 'Switch a fault for training on or off; 409 where no node of the simulated yard drives the house',
  body: TrainingOrder,
  answers: { 200: Training },
});
