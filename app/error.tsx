'use client';

import { Button, ButtonLink } from '@/components/ui/button';
import { Paper } from '@/components/frame/paper';

/** The paper stays; what went wrong is said on it, and how to go on. */
export default function ErrorPage({ error, reset }: { error: Error & { digest?: string }; reset(): void }) {
  return (
    <div className="flex min-h-dvh flex-col p-1 sm:p-2">
      <Paper>
        <main className="m-auto flex max-w-lg flex-col gap-4 p-6">
          <h1 className="text-title font-bold">This sheet could not be read. Nothing is lost.</h1>
          <p>
            The server answered with an error. Try again in a moment; if it stays so, tell the admin of your team
            {error.digest ? ` and name the error ${error.digest}` : ''}.
          </p>
          <div className="flex gap-2">
            <Button solid onClick={reset}>
              Try again
            </Button>
            <ButtonLink href="/jobs">To the jobs</ButtonLink>
          </div>
        </main>
      </Paper>
    </div>
  );
}
