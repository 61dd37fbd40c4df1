/** λ_g ↦ −ℓ(g) λ_g, ℓ the word length in the simple reflections. */
export default ({ family, n }, kit) => {
  const group = family === 'symmetric' ? kit.symmetricGroup(n) : kit.dihedralGroup(n);
  // Of the dihedral group the reflections s and rs; the symmetric one has adjacent transpositions as its generators.
  const simple = family === 'symmetric' ? group.generators : [n, n + 1];
  return kit.lengthModel(group, kit.wordLength(group, simple), {
    title: `Word length in the simple reflections of the ${family} group of ${n} ${family === 'symmetric' ? 'points' : 'corners'}`,
  });
};

export const claims = () => {
  const source = 'NOTES.md: a sum of walls from below, the gap from above';
  return [
    { constant: 'gap', relation: 'equals', value: 1, source: 'the least length of an element' },
    ...['ge', 'cge', 'cbe'].map((constant) => ({ constant, relation: 'equals', value: 1, source })),
  ];
};
