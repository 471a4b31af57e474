import { describe, expect, it } from 'vitest';
import { canonicalJson } from '../../../shared/safety/canonical';

describe('canonicalJson', () => {
  it('canonicalJson > keys in any order, nested > one text', () => {
    expect(canonicalJson({ b: [1, { d: null, c: 'x' }], a: true })).toBe(
      '{"a":true,"b":[1,{"c":"x","d":null}]}',
    );
  });

  it('canonicalJson > text that looks like structure > is escaped', () => {
    expect(canonicalJson({ a: '","b":"' })).toBe('{"a":"\\",\\"b\\":\\""}');
  });

  it.each([[1.5], [NaN], [Infinity], [2 ** 53]])('canonicalJson > the number %d > throws', (value) => {
    expect(() => canonicalJson(value)).toThrow(TypeError);
  });

  it('canonicalJson > no plain data > throws', () => {
    expect(() => canonicalJson(JSON.parse('{}', () => undefined) as never)).toThrow(TypeError);
    expect(() => canonicalJson(Object.create({ inherited: 1 }) as never)).toThrow(TypeError);
  });
});
