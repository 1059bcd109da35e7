import type { Refusal } from './send-auth';

/** The whole form's refusal, announced; a field's own stands under the field. */
export function Refused({ refusal }: { refusal: Refusal | null }) {
  return (
    <p role="alert" className="font-semibold text-alarm empty:hidden">
      {refusal === null || Object.keys(refusal.fields).length > 0 ? null : refusal.message}
    </p>
  );
}
