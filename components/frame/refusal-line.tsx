import { ErrorLine } from '@/components/ui/error-line';
import type { ErrorAnswer } from '@/lib/shared/errors';

/** A refusal of the server. Whoever was signed out signs in beside this page and tries again: nothing typed is lost. */
export function RefusalLine({ refusal }: { refusal: Pick<ErrorAnswer, 'error' | 'message'> }) {
  return (
    <ErrorLine
      actions={
        refusal.error === 'signed-out' && (
          <a href="/signin" target="_blank" className="text-ink underline underline-offset-[3px]">
            Sign in in another tab, then try again
          </a>
        )
      }
    >
      {refusal.message}
    </ErrorLine>
  );
}
