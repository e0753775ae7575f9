import { pictureHref, type UploadView } from '@/lib/shared/uploads';

interface PictureProps {
  upload: Pick<UploadView, 'id' | 'width' | 'height'>;
  size: 'large' | 'small';
  alt: string;
  className?: string;
}

/** A stored picture. The framework's image optimizer is kept away from what people send. */
export function Picture({ upload, size, alt, className }: PictureProps) {
  return (
    // eslint-disable-next-line @next/next/no-img-element -- see above
    <img
      src={pictureHref(upload.id, size)}
      width={upload.width}
      height={upload.height}
      alt={alt}
      loading={size === 'small' ? 'lazy' : 'eager'}
      decoding="async"
      className={className}
    />
  );
}
