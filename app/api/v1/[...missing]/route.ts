import { Problem, problemResponse } from '@/lib/server/errors';

/** A path that is no route answers as a thing that is not there, in the interface's own form. */
function missing(): Response {
  return problemResponse(new Problem('not-found'));
}

export { missing as GET, missing as POST, missing as PUT, missing as PATCH, missing as DELETE };
