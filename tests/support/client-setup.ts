import { cleanup } from '@testing-library/react';
import { afterEach } from 'vitest';

// jsdom draws nothing: these stand in for what components ask a real browser for.
HTMLDialogElement.prototype.showModal ??= function showModal() {
  this.setAttribute('open', '');
};
HTMLDialogElement.prototype.close ??= function close() {
  if (!this.hasAttribute('open')) return;
  this.removeAttribute('open');
  this.dispatchEvent(new Event('close'));
};
Element.prototype.scrollIntoView ??= function scrollIntoView() {};
window.scrollTo = () => undefined;

afterEach(() => {
  cleanup();
  localStorage.clear();
});
