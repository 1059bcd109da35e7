import type { Metadata } from 'next';
import { ForgotForm } from '@/components/door/forgot-form';

export const metadata: Metadata = { title: 'A new password' };

export default function ForgotPage() {
  return <ForgotForm />;
}
