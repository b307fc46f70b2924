import { defineProject } from 'vitest/config';
import { journeyProject } from '../../../scripts/testing/project.ts';

export default defineProject(journeyProject('e2e'));
