/**
 * Moves the focus to the control of a draft's field by its path, or to the nearest part that holds it. Fields
 * carry their path as `data-field`.
 * @returns false where no part of the screen shows it now
 */
export function focusField(path: string): boolean {
  for (let part = path; part !== ''; part = part.split('.').slice(0, -1).join('.')) {
    const holder = document.querySelector<HTMLElement>(`[data-field="${CSS.escape(part)}"]`);
    const control = holder?.querySelector<HTMLElement>('input:not([type=hidden]), select, textarea, button');
    if (!holder || !control) continue;
    control.focus({ preventScroll: true });
    holder.scrollIntoView({ block: 'center' });
    return true;
  }
  return false;
}
