import { describe, expect, it } from 'vitest';
import { bestCapabilityOf } from './capabilities.ts';
import { LABORATORIES } from './laboratories.ts';
import { makePlan } from './make-plan.ts';
import { trueValue } from './weight.ts';
import type { DemoPlan, PlannedCertificate } from './plan.ts';

const plan = makePlan();

function certificates({ steps }: DemoPlan): PlannedCertificate[] {
  return steps.flatMap((step) => (step.does === 'issue' || step.does === 'revise' ? [step.certificate] : []));
}

describe('the plan of the demo network', () => {
  it('is the same each time', { timeout: 30_000 }, () => {
    // As text: comparing some hundred thousand members one by one takes longer than making them.
    const textOf = (made: DemoPlan) => JSON.stringify([certificates(made), made.catalogue]);
    expect(textOf(makePlan()) === textOf(plan)).toBe(true);
  });

  it('does everything in the order of the days, and ends before the day it is looked at', () => {
    const days = plan.steps.map((step) => step.day);
    expect(days).toEqual(days.toSorted());
    expect(days.at(-1)! <= '2026-11-27').toBe(true);
  });

  it('names every value before somebody leans on it', () => {
    const issued = new Set<string>();
    for (const step of plan.steps) {
      if (step.does !== 'issue' && step.does !== 'revise') continue;
      for (const line of step.certificate.lines) {
        for (const { value } of line.references) expect(issued.has(value), value).toBe(true);
      }
      for (const key of step.keys) issued.add(key);
    }
  });

  it('gives every certificate number once in all laboratories, so that the catalogue points at one', () => {
    const numbers = plan.steps.flatMap((step) =>
      step.does === 'issue' ? [step.certificate.certificateNo] : [],
    );
    expect(new Set(numbers).size).toBe(numbers.length);
    expect(plan.catalogue.every((entry) => numbers.includes(entry.certificateNo))).toBe(true);
  });

  it('prints U to two significant digits and the value to the same place', () => {
    for (const { lines } of certificates(plan)) {
      for (const { expandedU, reportedDecimals, reportedUDecimals } of lines) {
        expect(reportedUDecimals).toBe(reportedDecimals);
        const digits = expandedU!.replace('.', '').replace(/^0+/, '').replace(/0+$/, '');
        expect(digits.length).toBeLessThanOrEqual(2);
      }
    }
  });

  it('claims no U below the best capability under accreditation, once rounded', () => {
    const nominals = new Map(
      plan.steps.flatMap((step) => {
        if (step.does !== 'register set' && step.does !== 'register weight') return [];
        const weights = step.does === 'register set' ? step.weights : [step.weight];
        return weights.map(({ registryNo, nominal }) => [registryNo, nominal] as const);
      }),
    );
    let claims = 0;
    for (const { issuer, lines } of certificates(plan)) {
      for (const line of lines) {
        const best = bestCapabilityOf(issuer, line.quantity, nominals.get(line.registryNo)!);
        if (!line.underAccreditation || best === null) continue;
        claims += 1;
        const halfDigit = 0.5 * 10 ** (Math.floor(Math.log10(best)) - 1);
        expect(Number(line.expandedU)).toBeGreaterThanOrEqual(best - 1.0001 * halfDigit);
      }
    }
    expect(claims).toBeGreaterThan(1500);
  });

  it('measures what is there: errors of sound values are of the size of their u', () => {
    const weights = plan.steps.flatMap((step) =>
      step.does === 'register set' ? step.weights : step.does === 'register weight' ? [step.weight] : [],
    );
    const sound = weights.flatMap((weight) =>
      weight.values.filter((value) => !value.isFaulty && value.stage !== 'as found'),
    );
    const errors = sound.map(
      ({ weight, quantity, performedEnd, deviation, u }) =>
        (deviation - trueValue(weight, quantity, performedEnd)) / u,
    );
    const beyond = (limit: number) =>
      errors.filter((error) => Math.abs(error) > limit).length / errors.length;
    expect(errors.length).toBeGreaterThan(4000);
    expect(Math.sqrt(errors.reduce((sum, error) => sum + error ** 2, 0) / errors.length)).toBeLessThan(1.1);
    expect(Math.sqrt(errors.reduce((sum, error) => sum + error ** 2, 0) / errors.length)).toBeGreaterThan(
      0.5,
    );
    expect(beyond(2)).toBeLessThan(0.06);
    expect(beyond(3.5)).toBe(0);
  });

  it('names no country that exists', () => {
    for (const { country } of LABORATORIES) expect(country).toMatch(/^X[A-Z]$/);
  });

  it('holds every kind of fault at least three times', () => {
    const count = new Map<string, Set<string>>();
    for (const { is, kind, certificateNo } of plan.catalogue) {
      if (is !== 'fault') continue;
      const family = kind.startsWith('scope') ? 'scope exceeded' : kind;
      count.set(family, (count.get(family) ?? new Set()).add(certificateNo));
    }
    expect(count.size).toBeGreaterThanOrEqual(11);
    for (const [kind, where] of count) expect(where.size, kind).toBeGreaterThanOrEqual(3);
  });
});
