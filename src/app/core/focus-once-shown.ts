import { afterNextRender, ElementRef, inject, Injector } from '@angular/core';

/**
 * For a part of a page in whose place something else comes: what was pressed is gone then, and the keyboard with it.
 * Called where injection is allowed.
 *
 * @param selector within the component's own element
 * @returns puts the focus there, once the page shows what has changed
 */
export function focusOnceShown(selector: string): () => void {
  const injector = inject(Injector);
  const { nativeElement } = inject<ElementRef<HTMLElement>>(ElementRef);
  return () => {
    afterNextRender(() => nativeElement.querySelector<HTMLElement>(selector)?.focus(), { injector });
  };
}
