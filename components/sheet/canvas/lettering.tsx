import { memo } from 'react';
import { fontSize, SPACING } from '@/diagram/layout/lettering';
import type { SceneText } from '@/diagram/layout/scene';

/** A text of the drawing, broken and placed by the scene. */
export const Lettering = memo(function Lettering({ text }: { text: SceneText }) {
  return (
    <text
      x={text.x}
      y={text.y}
      fontSize={fontSize(text.size)}
      fontWeight={text.bold ? 700 : 400}
      textAnchor={text.anchor ?? 'start'}
      letterSpacing={text.spaced ? SPACING * text.size : undefined}
      transform={text.turn ? `rotate(${text.turn * 90} ${text.x} ${text.y})` : undefined}
      fill={text.tone === 'grey' ? 'var(--grey)' : 'var(--ink)'}
    >
      {text.text}
    </text>
  );
});

export const Letterings = ({ texts }: { texts: readonly SceneText[] }) => (
  <>
    {texts.map((text, i) => (
      <Lettering key={`${i} ${text.text}`} text={text} />
    ))}
  </>
);
