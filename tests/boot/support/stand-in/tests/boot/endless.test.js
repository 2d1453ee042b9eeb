import { test } from 'node:test';

test('takes longer than anyone waits', () => new Promise((resolve) => setTimeout(resolve, 3_600_000)));
