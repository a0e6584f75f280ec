import { Validators } from '@angular/forms';

/** As `Password` of the contracts has it. */
export const PASSWORD_RULES = [Validators.minLength(10), Validators.maxLength(200)];
