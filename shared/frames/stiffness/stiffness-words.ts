import type { Stiffness } from './analyse-stiffness';

/** What the figures mean for a glued piece, one sentence after the other. Own words; glue that softens with warmth is common knowledge. */
export const PIN_JOINT_WORDS = [
  'Counted as sticks on pins: every joint turns freely, no stick bends or stretches.',
  'A glued joint holds more than a pin once it is cold and little while it is warm. Until then a piece folds in the ways counted here.',
  'A piece with ways of moving needs temporary braces while the glue is warm. Afterwards only its glue keeps its shape, so nothing hangs on it.',
  'A piece without ways of moving keeps its shape by its sticks alone.',
  'Only small movements are counted. This says nothing about how much a piece carries.',
] as const;

const plural = (count: number, one: string, many: string): string =>
  `${count.toLocaleString('en')} ${count === 1 ? one : many}`;

function movingText({ mechanisms, flat, bits, moving, joints }: Stiffness): string[] {
  if (mechanisms === 0) return ['It keeps its shape: no way of moving.'];
  const inPlane = flat
    ? ` ${flat.inPlane.toLocaleString('en')} within its plane and ${flat.outOfPlane.toLocaleString('en')} out of it.`
    : '';
  const text = [`It can fold in ${plural(mechanisms, 'way', 'ways')}.${inPlane}`];
  if (bits > 1)
    text.push(
      `It is in ${bits} bits that nothing links; their moving against each other is counted. Link them or make them pieces of their own.`,
    );
  else if (moving.length < joints)
    text.push(`${plural(moving.length, 'joint moves', 'joints move')}; the rest is stiff.`);
  return text;
}

/**
 * What the stiffness of a frame means, in sentences for the screen.
 * @param stiffness of the frame
 * @returns ways of moving first, then spare struts, then what is uncertain
 */
export function stiffnessText(stiffness: Stiffness): string[] {
  const { selfStress, strained, soft, certain } = stiffness;
  const text = movingText(stiffness);
  if (selfStress > 0) {
    const which = strained ? ` among ${plural(strained.length, 'strut', 'struts')}` : '';
    text.push(
      `${plural(selfStress, 'strut is', 'struts are')} spare${which}: lengths there must fit each other, or the last one does not go in.`,
    );
  }
  if (soft)
    text.push(
      'It is held by a hair: joints lie almost in one plane or line, so a tenth of a millimetre decides. Treat it as loose and brace it.',
    );
  if (!certain)
    text.push(
      'The count is not certain: the frame lies between loose and stiff. Treat it as loose and brace it.',
    );
  return text;
}
