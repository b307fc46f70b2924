import { defineProject } from 'vitest/config';
import { databaseProject } from '../../scripts/testing/project.ts';

export default defineProject(databaseProject('api'));
