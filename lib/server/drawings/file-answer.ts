import 'server-only';
import { FILE_POLICY } from '@/lib/shared/file-policy';

/** "OH-207 Heron Row 9, B": number, title and revision, without the signs that file systems and headers refuse. */
export const fileName = (
  titleBlock: { number: string; title: string; revision: string },
  ending: string,
  /** what of the drawing it is: "ways" */
  piece = '',
): string =>
  `${titleBlock.number} ${titleBlock.title}${titleBlock.revision === '-' ? '' : `, ${titleBlock.revision}`} ${piece}`
    .replace(/[\p{Cc}"\\/:*?<>|]+/gu, ' ')
    .replace(/\s+/g, ' ')
    .trim()
    .slice(0, 120) + `.${ending}`;

/** A file to keep, under a name that also carries letters beyond ASCII (RFC 6266). Never shown as a page of the app. */
export function fileAnswer(body: BodyInit, type: string, name: string): Response {
  const plain = name.normalize('NFKD').replace(/[^\x20-\x7e]/g, '');
  const exact = encodeURIComponent(name).replace(
    /['()*]/g,
    (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return new Response(body, {
    headers: {
      'content-type': type,
      'content-disposition': `attachment; filename="${plain}"; filename*=UTF-8''${exact}`,
      'content-security-policy': FILE_POLICY,
      'cache-control': 'no-store',
      'x-content-type-options': 'nosniff',
    },
  });
}
