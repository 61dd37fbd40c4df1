import { describe, expect, it } from 'vitest';
import { isToken, newToken, tokenDigest } from '../../src/tokens/token-text.js';

describe('tokens', () => {
  it('are recognised, and no two are alike', () => {
    const tokens = Array.from({ length: 100 }, newToken);
    for (const token of tokens) expect(isToken(token)).toBe(true);
    expect(new Set(tokens.map((token) => tokenDigest(token).toString('hex'))).size).toBe(100);
  });

  it('with one character changed are none', () => {
    const token = newToken();
    for (let k = 0; k < token.length; k++) {
      const other = token[k] === 'A' ? 'B' : 'A';
      expect(isToken(`${token.slice(0, k)}${other}${token.slice(k + 1)}`)).toBe(false);
    }
  });
});
