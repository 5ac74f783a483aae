import { expect, it } from 'vitest';
import { drawingSvg } from './chart-export.ts';

it('drawingSvg takes every drawing once, names it, and leaves no variable behind', () => {
  const element = document.createElement('div');
  element.innerHTML =
    '<svg id="under"><path stroke="var(--ink)" d="M0 0"/></svg><div><svg id="over"><g class="draglayer"/><svg id="inner"/></svg></div>';
  // A DOM without layout has no sizes of its own.
  element.getBoundingClientRect = () => new DOMRect(0, 0, 900, 400);
  const svg = drawingSvg(element, 'A < B', '');
  const drawn = new DOMParser().parseFromString(svg, 'image/svg+xml');
  expect(drawn.querySelector('parsererror')).toBeNull();
  expect(drawn.querySelectorAll('#under, #over, #inner')).toHaveLength(3);
  expect(drawn.querySelector('.draglayer')).toBeNull();
  expect(drawn.querySelector('title')?.textContent).toBe('A < B');
  expect(svg).toContain('A simulation is not a test.');
  expect(svg).not.toContain('var(--');
});
