/**
 * Moves the keyboard to the menu button of a card or set, once it is where it belongs: a card that goes to
 * another set is a new element there.
 */
export function focusMenuOf(id: string): void {
  const find = () => document.querySelector<HTMLElement>(`[data-menu-of="${id}"]`)?.focus();
  // After the menu has closed and given the focus back to where it was.
  setTimeout(find, 60);
}
