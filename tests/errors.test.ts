import { describe, expect, it } from 'vitest';
import { invariant, SimError } from '../sim/errors.ts';
import type { SimFault } from '../sim/errors.ts';

describe('SimError', () => {
  const faults: [SimFault, string][] = [
    [{ kind: 'broken-invariant', claim: 'the bed has a segment' }, 'does not hold: the bed has a segment'],
    [{ kind: 'wrong-size', array: 'dydt', expected: 6, received: 5 }, 'dydt has 5 entries, expected 6'],
    [{ kind: 'not-finite', quantity: 'pTop', value: NaN }, 'pTop is NaN, expected a finite number'],
  ];

  it.each(faults)('keeps %o and says it', (fault, message) => {
    const error = new SimError(fault);
    expect(error.fault).toEqual(fault);
    expect(error.message).toBe(message);
    expect(error).toBeInstanceOf(Error);
    expect(error.name).toBe('SimError');
  });
});

describe('invariant', () => {
  it('lets a true claim pass', () => {
    expect(() => {
      invariant(true, 'one is one');
    }).not.toThrow();
  });

  it('throws the claim that does not hold', () => {
    expect(() => {
      invariant(false, 'the bed has a segment');
    }).toThrow(new SimError({ kind: 'broken-invariant', claim: 'the bed has a segment' }));
  });
});
