/** Menus that open from a summary: left by Escape, by going on to something else, or by a click beside them. */

/** For `keydown` on the details: Escape closes and goes back to the summary. */
export function closeOnEscape(event: KeyboardEvent): void {
  const details = event.currentTarget as HTMLElement;
  if (event.key !== 'Escape' || !details.hasAttribute('open')) return;
  details.removeAttribute('open');
  details.querySelector('summary')?.focus();
  event.stopPropagation();
}

/** For `focusout` on the details: closes when the focus goes elsewhere. */
export function closeOnLeave(event: FocusEvent): void {
  const details = event.currentTarget as HTMLElement;
  if (event.relatedTarget instanceof Node && !details.contains(event.relatedTarget)) details.removeAttribute('open');
}

/** For `toggle` on the details: while it is open, a press anywhere else closes it. */
export function closeOnPressBeside(event: Event): void {
  const details = event.currentTarget as HTMLDetailsElement;
  if (!details.open) return;
  const press = (e: PointerEvent): void => {
    if (details.open && e.composedPath().includes(details)) return;
    details.open = false;
    document.removeEventListener('pointerdown', press);
  };
  document.addEventListener('pointerdown', press);
}
