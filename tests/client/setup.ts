/** For every test of the client: what jsdom lacks, a page that is emptied after each test, and noise as failure. */
import { cleanup } from '@testing-library/react';
import { afterEach, beforeEach, expect, vi } from 'vitest';

HTMLDialogElement.prototype.showModal = function showModal() {
  this.setAttribute('open', '');
};
HTMLDialogElement.prototype.close = function close() {
  this.removeAttribute('open');
};
Element.prototype.scrollIntoView = () => undefined;

let said: string[] = [];

beforeEach(() => {
  said = [];
  localStorage.clear();
  vi.spyOn(console, 'error').mockImplementation((...words: unknown[]) => {
    said.push(words.map(String).join(' '));
  });
});

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
  expect(said, 'the page complained').toEqual([]);
});
