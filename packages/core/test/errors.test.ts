import { describe, expect, it } from 'vitest';
import { ERROR_CODES, ThalwegError } from '../src/errors.js';

describe('ThalwegError', () => {
  it('carries code, pointer, details and cause', () => {
    const cause = new Error('below');
    const error = new ThalwegError('negative-rate', 'expected a rate ≥ 0, got −1', {
      pointer: '/generator/rates/0/1',
      details: { rate: -1 },
      cause,
    });
    expect(error).toBeInstanceOf(Error);
    expect({ ...error }).toEqual({
      name: 'ThalwegError',
      code: 'negative-rate',
      pointer: '/generator/rates/0/1',
      details: { rate: -1 },
    });
    expect(error.message).toBe('expected a rate ≥ 0, got −1');
    expect(error.cause).toBe(cause);
    expect(String(error)).toBe('ThalwegError: expected a rate ≥ 0, got −1');
    const plain = new ThalwegError('internal', 'x');
    expect([plain.pointer, plain.details, 'cause' in plain]).toEqual([undefined, undefined, false]);
  });

  it('has kebab-case codes, each with its meaning', () => {
    for (const [code, meaning] of Object.entries(ERROR_CODES)) {
      expect(code).toMatch(/^[a-z]+(-[a-z]+)*$/);
      expect(meaning.length).toBeGreaterThan(10);
    }
  });
});
