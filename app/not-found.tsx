import { ButtonLink } from '@/components/ui/button';
import { Paper } from '@/components/frame/paper';

export default function NotFound() {
  return (
    <div className="flex min-h-dvh flex-col p-1 sm:p-2">
      <Paper>
        <main className="m-auto flex max-w-lg flex-col items-start gap-4 p-6">
          <h1 className="text-title font-bold">There is no such sheet</h1>
          <p>It was put away, its address is mistyped, or it belongs to another team.</p>
          <ButtonLink href="/jobs">To the jobs</ButtonLink>
        </main>
      </Paper>
    </div>
  );
}
