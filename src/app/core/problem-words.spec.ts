import { ApiProblem } from './api-problem';
import { fieldWords, problemWords } from './problem-words';

describe('problemWords', () => {
  it('puts the figures in', () => {
    expect(problemWords(new ApiProblem('too-many-tries', 429, { seconds: 40 }))).toContain('Wait 40 seconds');
  });

  it('words a broken rule that it does not know like any other refusal', () => {
    expect(problemWords(new ApiProblem('some-new-rule', 409))).toContain('could not read');
  });
});

describe('fieldWords', () => {
  const fields = [
    { pointer: '#/place/exact/latitude', code: 'half-a-coordinate', detail: 'x' },
    { pointer: '#/reason', code: 'too_small', detail: 'x' },
  ];

  it('words what is wrong with a field, or with a part of it', () => {
    expect(fieldWords(fields, '#/reason')).toContain('Too short');
    expect(fieldWords(fields, '#/place')).toContain('both coordinates');
  });

  it('does not take a field for another whose name begins alike', () => {
    expect(fieldWords([{ pointer: '#/titleLong', code: 'too_big', detail: 'x' }], '#/title')).toBeNull();
  });

  it('has nothing against a field that is right', () => {
    expect(fieldWords(fields, '#/qualifier')).toBeNull();
  });
});
