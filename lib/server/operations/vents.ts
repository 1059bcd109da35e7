import { ReversingVent, ReversingVentCreate } from '@/lib/schema/reversing-vent';
import { operation } from '../operation';

export const createReversingVent = operation({
  id: 'reversing-vent.create',
  method: 'POST',
  path: '/houses/{house}/reversing-vents',
  action: 'wiring.write',
  summary:
    'A reversing vent: a channel to open it, one to shut it, and the interlock between; all or nothing',
  body: ReversingVentCreate,
  answers: { 201: ReversingVent },
});
