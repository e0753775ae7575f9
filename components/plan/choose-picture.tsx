'use client';

import { ButtonLink } from '@/components/ui/button';
import { Picture } from '@/components/photographs/picture';
import type { UploadView } from '@/lib/shared/uploads';

interface ChoosePictureProps {
  jobId: string;
  /** pictures of the job that lie behind no plan yet */
  uploads: readonly UploadView[];
  mayEdit: boolean;
  heading: string;
  onChoose(upload: UploadView): void;
}

/** Before a storey has its plan: which of the job's pictures is one. */
export function ChoosePicture({ jobId, uploads, mayEdit, heading, onChoose }: ChoosePictureProps) {
  // What was added as a floor plan comes first.
  const sorted = [...uploads].sort((a, b) => Number(b.subject === 'plan') - Number(a.subject === 'plan'));
  return (
    <div className="px-4 py-4 lap:px-6">
      <h2 className="text-title font-bold">{heading}</h2>
      <p className="mt-2 max-w-[60ch]">
        {mayEdit
          ? 'A plan is any picture of a storey: a scan, an agent’s sheet, a photographed sketch. The parts of the drawing are then put where they hang in the home; the other sheets stay as they are.'
          : 'Whoever draws this job can lay a floor plan here.'}
      </p>
      {mayEdit && (
        <>
          {sorted.length > 0 && (
            <ul className="mt-5 grid grid-cols-[repeat(auto-fill,minmax(min(100%,180px),1fr))] gap-5">
              {sorted.map((upload) => (
                <li key={upload.id}>
                  <button
                    type="button"
                    className="w-full cursor-pointer text-left hover:underline"
                    onClick={() => onChoose(upload)}
                  >
                    <span className="flex aspect-[4/3] items-center justify-center border border-rule bg-desk p-2">
                      <Picture upload={upload} size="small" alt="" className="size-full object-contain" />
                    </span>
                    <span className="mt-1 block">Draw on {upload.caption || 'this picture'}</span>
                  </button>
                </li>
              ))}
            </ul>
          )}
          <div className="mt-5">
            <ButtonLink solid={sorted.length === 0} href={`/jobs/${jobId}/photographs`}>
              Add a picture
            </ButtonLink>
          </div>
        </>
      )}
    </div>
  );
}
