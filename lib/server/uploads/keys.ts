import 'server-only';

export const STORED_TYPE = 'image/webp';

/** The key of a stored picture: the team comes first, then the job. */
export const keyOf = ({ teamId, jobId, id }: { teamId: string; jobId: string; id: string }, size: 'large' | 'small') =>
  `${teamId}/${jobId}/${id}/${size}.webp`;
