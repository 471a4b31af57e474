import type { Config } from 'tailwindcss';

/** Utilities name the variables of src/styles/tokens.css and nothing else: both themes, one set of words. */
export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  theme: {
    screens: { sm: '640px', desk: '900px', wide: '1200px' },
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ground: 'var(--ground)',
      tint: 'var(--tint)',
      ink: 'var(--ink)',
      pencil: 'var(--pencil)',
      rule: 'var(--rule)',
      graphite: 'var(--graphite)',
      'on-fill': 'var(--on-fill)',
      madder: 'var(--madder)',
      'on-madder': 'var(--on-madder)',
      waiting: 'var(--s-waiting)',
      ready: 'var(--s-ready)',
      hand: 'var(--s-hand)',
      drying: 'var(--s-drying)',
      check: 'var(--s-check)',
      passed: 'var(--s-passed)',
      rework: 'var(--s-rework)',
      held: 'var(--s-held)',
    },
    fontFamily: { sans: 'var(--font)' },
    fontWeight: { light: '300', normal: '400', medium: '500', semibold: '600' },
    fontSize: {
      small: ['var(--t-1)', { lineHeight: '1.4' }],
      base: ['var(--t0)', { lineHeight: '1.4' }],
      t1: ['var(--t1)', { lineHeight: '1.3' }],
      t2: ['var(--t2)', { lineHeight: '1.25' }],
      t3: ['var(--t3)', { lineHeight: '1.2' }],
      t4: ['var(--t4)', { lineHeight: '1.15' }],
      t5: ['var(--t5)', { lineHeight: '1.1' }],
      t6: ['var(--t6)', { lineHeight: '1.1' }],
    },
    borderRadius: { none: '0' },
    boxShadow: { none: 'none' },
    extend: {
      borderWidth: { line: 'var(--line)' },
      minHeight: { tap: 'var(--tap)', desk: 'var(--tap-desk)', glove: 'var(--tap-glove)' },
      maxWidth: { words: '38rem' },
    },
  },
} satisfies Config;
