// What plans say of the lengths of ways is hidden with the places.
import { expect, test } from 'vitest';
import { hiddenText } from '../../src/report/hiding/hidden-spec.ts';
import { modelText } from '../golden/models.ts';
import { compileText } from '../pipeline/compile-text.ts';

test('an action on a link keeps what it does but for the length', () => {
  const action =
    '  tunnel: { kind: link, between: [North fen, Long holm], crossing-death: { set: 0.25 }, distance: { set: 7.125 km }, from: 2030 }\n';
  const { spec } = compileText(modelText('reed-hare').replace('\nactions:\n', `\nactions:\n${action}`));
  const text = hiddenText(spec);
  expect(text).toContain('crossing-death: { set: 0.25 }');
  expect(text).not.toContain('7.125');
});
