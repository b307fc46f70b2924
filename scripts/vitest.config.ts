import { defineProject } from 'vitest/config';
import { project } from './testing/project.ts';

export default defineProject(project('scripts', { include: ['**/*.test.ts'] }));
