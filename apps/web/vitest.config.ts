import react from '@vitejs/plugin-react';
import { defineProject } from 'vitest/config';
import { project } from '../../scripts/testing/project.ts';

export default defineProject({
  plugins: [react()],
  ...project('web', { environment: 'happy-dom', include: ['src/**/*.test.{ts,tsx}'] }),
});
