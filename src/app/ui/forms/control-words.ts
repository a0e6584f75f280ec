import type { AbstractControl } from '@angular/forms';

/** What stands beside a field that needs mending; null while it is all right. */
export function controlWords(control: AbstractControl): string | null {
  const errors = control.errors;
  if (!errors) return null;
  if (typeof errors['server'] === 'string') return errors['server'];
  if (errors['required']) return $localize`This is needed.`;
  if (errors['email']) return $localize`This is not an e-mail address.`;
  if (errors['minlength']) return $localize`At least ${errors['minlength'].requiredLength}:count: characters.`;
  if (errors['maxlength']) return $localize`At most ${errors['maxlength'].requiredLength}:count: characters.`;
  if (errors['min']) return $localize`At least ${errors['min'].min}:number:.`;
  if (errors['max']) return $localize`At most ${errors['max'].max}:number:.`;
  return $localize`This is not written as it should be.`;
}
