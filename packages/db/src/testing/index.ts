export { TEST_API_PASSWORD, TEST_WORKER_PASSWORD } from './template.ts';
export { type TestDatabase, withTestDatabase } from './test-database.ts';
