import { defineProject } from 'vitest/config';
import { project } from '../../scripts/testing/project.ts';

export default defineProject(project('solver'));
