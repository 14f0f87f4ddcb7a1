import { loadPage } from './load-page';
import type { AppError } from '@/app/_shared/result';
import { toast } from '@/components/toast';

/** A failure as a person reads it: the sentence, and the reference when there is one to quote. */
export function failureText(error: AppError): string {
  return error.reference === undefined ? error.message : `${error.message} Reference ${error.reference}.`;
}

/** Says a failure at the edge of the page; when the session is over, with the way to sign in and come back. */
export function sayFailure(error: AppError): void {
  toast.failed(failureText(error), error.code === 'unauthenticated' ? { action: SIGN_IN } : undefined);
}

const SIGN_IN = {
  label: 'Sign in',
  onPress: () => {
    const here = `${window.location.pathname}${window.location.search}`;
    loadPage(`/sign-in?next=${encodeURIComponent(here)}`);
  },
};
