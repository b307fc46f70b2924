import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, expect, test } from 'vitest';
import { linkedText } from './linked-text.tsx';

afterEach(cleanup);

test('addresses become links without the mark that ends the sentence; the rest stays text', () => {
  const { container } = render(
    <p>
      {linkedText(
        'Open http://127.0.0.1:3000/i#abc-_1. Or <b>ask</b>: https://farlug.example/x?y=1, please.',
      )}
    </p>,
  );
  expect(screen.getAllByRole('link').map((link) => link.getAttribute('href'))).toEqual([
    'http://127.0.0.1:3000/i#abc-_1',
    'https://farlug.example/x?y=1',
  ]);
  expect(container.querySelector('b')).toBeNull();
  expect(container.textContent).toBe(
    'Open http://127.0.0.1:3000/i#abc-_1. Or <b>ask</b>: https://farlug.example/x?y=1, please.',
  );
});
