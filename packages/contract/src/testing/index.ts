export * from '../../test/random-rows.ts';
