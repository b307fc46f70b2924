// Whole journeys in a real browser, against a running product: `npm test` starts both and says where they are.
import { defineProject } from 'vitest/config';
import { project } from '../../../scripts/testing/project.ts';

export default defineProject(
  project('e2e', {
    include: ['**/*.test.ts'],
    globalSetup: ['../../../scripts/testing/running-product.ts'],
    fileParallelism: false,
    sequence: { concurrent: false },
    testTimeout: 240_000,
    hookTimeout: 120_000,
  }),
);
