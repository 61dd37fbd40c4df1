import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import type { ConstantId, End, Grade } from '../../src/sheet/bracket.js';
import { type SheetRow, closeBrackets, nameOf } from '../../src/sheet/close-brackets.js';
import {
  GRADE_ORDER,
  type OrderRelation,
  type RowKey,
  betterLower,
  betterUpper,
  orderRelations,
} from '../../src/sheet/order-relations.js';
import { CLOSED_TOLERANCE, ORDER_TOLERANCE } from '../../src/tolerances.js';
import { expectError } from '../helpers/expect-error.js';

const ALL = orderRelations({ gns: true, primitive: true });

function end(value: number, grade: Grade = 'certified', more: Partial<End> = {}): End {
  return { value, grade, by: 'given', ...more };
}

function row(id: ConstantId, lower: End | null, upper: End | null): SheetRow {
  return { key: keyOf(id), lower, upper, closed: false, notes: [] };
}

function keyOf(id: ConstantId): RowKey {
  return id === 'ge' ? { id, mean: 'logarithmic' } : { id };
}

function close(rows: readonly SheetRow[], relations: readonly OrderRelation[] = ALL, scale = 1): SheetRow[] {
  return closeBrackets(rows, relations, scale);
}

describe('the order of the constants', () => {
  const text = (relations: readonly OrderRelation[]): string[] =>
    relations.map(({ below, above, ifPositive }) => `${below.id} ≤ ${above.id}${ifPositive ? ', if positive' : ''}`).sort(); // prettier-ignore

  it('holds in full for primitive GNS-symmetric generators', () => {
    expect(text(ALL)).toEqual(
      [
        'cbe ≤ be',
        'cge ≤ cbe',
        'cge ≤ clsi, if positive',
        'cge ≤ ge',
        'clsi ≤ mlsi',
        'ge ≤ gap, if positive',
        'ge ≤ mlsi, if positive',
        'lsi ≤ mlsi',
        'mlsi ≤ gap',
      ].sort(),
    );
  });

  it('says nothing of ge and mlsi without primitivity, and of the metric without GNS symmetry', () => {
    expect(text(orderRelations({ gns: true, primitive: false }))).not.toContain('ge ≤ mlsi, if positive');
    expect(text(orderRelations({ gns: true, primitive: false }))).not.toContain('lsi ≤ mlsi');
    expect(text(orderRelations({ gns: false, primitive: true }))).toEqual(['cbe ≤ be', 'clsi ≤ mlsi']);
  });
});

describe('closeBrackets', () => {
  it.each(ALL.map((relation) => [relation.why, relation] as const))(
    'passes ends both ways along %s',
    (why, relation) => {
      const rows = [row(relation.below.id, end(0.4), null), row(relation.above.id, null, end(0.9, 'enclosed'))];
      const [below, above] = close(rows, [relation]);
      expect(above.lower).toEqual({ value: 0.4, grade: 'certified', by: `${why}; given` });
      expect(below.upper).toEqual({ value: 0.9, grade: 'enclosed', by: `${why}; given` });
      expect(rows[0].upper).toBe(null);
    },
  );

  it.each(ALL.map((relation) => [relation.why, relation] as const))(
    'lifts a lower end that is not positive along %s only where that is true',
    (_, relation) => {
      for (const value of [0, -0.5]) {
        const rows = [row(relation.below.id, end(value), null), row(relation.above.id, null, null)];
        const [, above] = close(rows, [relation]);
        expect(above.lower?.value).toBe(relation.ifPositive ? undefined : value);
      }
    },
  );

  it('goes through chains of relations, whatever their order', () => {
    const rows = [
      row('gap', null, end(1)),
      row('mlsi', null, null),
      row('clsi', null, null),
      row('ge', null, null),
      row('cge', end(0.5), null),
      row('cbe', null, end(2)),
      row('be', null, null),
      row('lsi', null, null),
    ];
    for (const relations of [ALL, [...ALL].reverse()]) {
      const sheet = new Map(close(rows, relations).map((found) => [nameOf(found.key), found]));
      for (const id of ['gap', 'mlsi', 'clsi', 'ge', 'cge', 'cbe', 'be'])
        expect(sheet.get(id)?.lower?.value, id).toBe(0.5);
      for (const id of ['gap', 'mlsi', 'clsi', 'ge', 'lsi']) expect(sheet.get(id)?.upper?.value, id).toBe(1);
      expect(sheet.get('cge')?.upper?.value).toBe(1);
      expect(sheet.get('cbe')?.upper?.value).toBe(2);
      expect(sheet.get('lsi')?.lower).toBe(null);
    }
  });

  it('leaves an end alone where the passed one is no better', () => {
    const own = end(0.7, 'certified', { by: 'own' });
    const [, mlsi] = close([row('clsi', end(0.6), null), row('mlsi', own, null)]);
    expect(mlsi.lower).toBe(own);
  });

  it('prefers the stronger grade on ties, and the value otherwise', () => {
    const stronger = end(0.5, 'enclosed', { by: 'proof' });
    const [cge, ge] = close([row('cge', stronger, null), row('ge', end(0.5 + 1e-14), null)]);
    expect(ge.lower).toMatchObject({ grade: 'enclosed', by: 'cge ≤ ge; proof' });
    expect(cge.lower).toBe(stronger);
    const [, clearly] = close([row('cge', stronger, null), row('ge', end(0.5 + 1e-8), null)]);
    expect(clearly.lower?.grade).toBe('certified');
  });

  it('throws when a lower end lies above an upper one, naming both', () => {
    const rows = [
      row('ge', end(1.1, 'certified', { by: 'a rule' }), null),
      row('gap', null, end(1, 'certified', { by: 'an eigenvalue' })),
    ];
    expectError(() => close(rows), 'internal', /in order, got 1\.1 \(.*a rule\) above 1 \(.*an eigenvalue\)/);
    // The same values on rows that no relation joins are no contradiction.
    expect(close([rows[0], row('cbe', null, end(1))]).length).toBe(2);
  });

  it('allows for the margins and for rounding, and not for more', () => {
    const at = (excess: number, margin: number) => (): SheetRow[] =>
      close([row('gap', end(2 + excess, 'certified', { margin }), end(2, 'certified', { margin }))]);
    expect(at(1e-4, 1e-4)()[0].lower?.value).toBe(2.0001);
    expect(at(4 * ORDER_TOLERANCE, 0)()[0].closed).toBe(true);
    expectError(at(3e-4, 1e-4), 'internal', /in order/);
    expectError(at(6 * ORDER_TOLERANCE, 0), 'internal', /in order/);
  });

  it('measures rounding by the rates at hand', () => {
    const tiny = [row('be', end(3e-12), end(1e-12))];
    expect(close(tiny, ALL, 1).length).toBe(1);
    expectError(() => close(tiny, ALL, 1e-12), 'internal', /in order/);
  });

  it('knows the order of what is unbounded', () => {
    const at = (low: number, high: number) => (): SheetRow[] => close([row('cbe', end(low), end(high))]);
    for (const [low, high] of [[-Infinity, 1], [1, Infinity], [-Infinity, -Infinity]]) expect(at(low, high)().length).toBe(1); // prettier-ignore
    for (const [low, high] of [[1, -Infinity], [Infinity, 1], [Infinity, -Infinity]]) expectError(at(low, high), 'internal', /in order/); // prettier-ignore
  });

  it('passes −∞ down to a row with a finite end of a weaker grade', () => {
    const [cge] = close([row('cge', null, end(1, 'certified')), row('cbe', null, end(-Infinity, 'observed'))]);
    expect(cge.upper?.value).toBe(-Infinity);
  });

  it('calls a bracket closed when its width is small beside its value or the gap', () => {
    const closed = (low: number, high: number, scale = 1): boolean =>
      close([row('be', end(low), end(high))], ALL, scale)[0].closed;
    expect(closed(1, 1 + CLOSED_TOLERANCE / 2)).toBe(true);
    expect(closed(1, 1 + 2 * CLOSED_TOLERANCE)).toBe(false);
    expect(closed(-1e-13, 1e-13)).toBe(true);
    expect(closed(-1e-13, 1e-13, 1e-8)).toBe(false);
    expect(closed(-Infinity, -Infinity)).toBe(true);
    expect(closed(-Infinity, 1)).toBe(false);
    expect(close([row('be', null, end(1))])[0].closed).toBe(false);
  });
});

describe('the better of two ends', () => {
  const grade = fc.constantFrom(...GRADE_ORDER);
  const anyEnd = fc.record({ value: fc.double({ min: -10, max: 10, noNaN: true }), grade, by: fc.constant('any') });

  it('is one of the two, not clearly worse than either', () => {
    fc.assert(
      fc.property(anyEnd, anyEnd, (a, b) => {
        const [low, high] = [betterLower(a, b), betterUpper(a, b)];
        const slack = 1e-12 * (Math.abs(a.value) + Math.abs(b.value));
        expect([a, b]).toContain(low);
        expect([a, b]).toContain(high);
        expect(low?.value).toBeGreaterThanOrEqual(Math.max(a.value, b.value) - slack);
        expect(high?.value).toBeLessThanOrEqual(Math.min(a.value, b.value) + slack);
      }),
    );
  });

  it('has the stronger grade at equal values, whichever comes first', () => {
    fc.assert(
      fc.property(anyEnd, grade, (a, other) => {
        const b = { ...a, grade: other };
        const strongest = GRADE_ORDER.find((g) => g === a.grade || g === other);
        for (const better of [betterLower, betterUpper]) {
          expect(better(a, b)?.grade).toBe(strongest);
          expect(better(b, a)?.grade).toBe(strongest);
        }
      }),
    );
  });

  it('is the one that exists', () => {
    const a = end(1);
    expect([betterLower(a, null), betterLower(null, a), betterUpper(null, null)]).toEqual([a, a, null]);
  });

  it('is −∞ only when both are', () => {
    for (const grade of GRADE_ORDER) {
      const [unbounded, finite] = [end(-Infinity, 'certified'), end(0, grade)];
      for (const pair of [
        [unbounded, finite],
        [finite, unbounded],
      ]) {
        // prettier-ignore
        expect(betterLower(pair[0], pair[1])?.value).toBe(0);
        expect(betterUpper(pair[0], pair[1])?.value).toBe(-Infinity);
      }
    }
    expect(betterLower(end(-Infinity), end(-Infinity))?.value).toBe(-Infinity);
  });
});
