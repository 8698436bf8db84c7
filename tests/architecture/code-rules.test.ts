import { describe, expect, it } from 'vitest';
import { CODE_RULES, listBrokenLines } from '#tests/architecture/code-rules.ts';
import { listSources } from '#tests/architecture/project-files.ts';

const files = listSources();

describe.each(CODE_RULES)('$sentence', (rule) => {
  it('holds', () => {
    expect(files.flatMap((file) => listBrokenLines(rule, file))).toEqual([]);
  });

  it('refuses a made-up line against it and allows one that keeps it', () => {
    expect(listBrokenLines(rule, { path: rule.inFile, text: `${rule.refused}\n` })).toHaveLength(1);
    expect(listBrokenLines(rule, { path: rule.inFile, text: `${rule.allowed}\n` })).toEqual([]);
  });
});
