import { expect, it } from 'vitest';
import { FactsDigest } from './facts-digest.ts';

const of = (...facts: object[]) => {
  const digest = new FactsDigest();
  for (const fact of facts) digest.add(fact);
  return digest.end();
};

it('is the same whatever the order of the members, and without those that are not there', () => {
  expect(of({ b: [1, 'µ'], a: null })).toBe(of({ a: null, b: [1, 'µ'], gone: undefined }));
});

it('differs where one member, one row or the order of facts does', () => {
  const facts = [{ a: [{ b: 1 }] }, { a: [{ b: 2 }] }] as const;
  expect(of(facts[0])).not.toBe(of(facts[1]));
  expect(of(...facts)).not.toBe(of(facts[1], facts[0]));
  expect(of({ a: 1, b: 2 })).not.toBe(of({ a: 1 }, { b: 2 }));
});
