import { ChangeDetectionStrategy, Component, model, signal } from '@angular/core';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import { MatSelectModule } from '@angular/material/select';
import { UNCERTIFICATED_TOLERANCE_UM } from '@shared/scale/calibration';
import { NO_BREAK_SPACE } from '@shared/units/length';

export interface Micrometer {
  /** distance of neighbouring graduations, µm */
  readonly spacingUm: number;
  /** limit of error between any two of them, µm, ± */
  readonly toleranceUm: number;
}

/** `10 µm (0.01 mm)`: micrometers are engraved in mm, and thought of in µm. */
export function spacingWords(um: number): string {
  return `${um}${NO_BREAK_SPACE}µm (${Number((um / 1000).toPrecision(6))}${NO_BREAK_SPACE}mm)`;
}

/** What stage micrometers and rulers are divided into. */
const SPACINGS = [10, 20, 50, 100, 500, 1000].map((um) => ({ um, words: spacingWords(um) }));

/** What the ruling is, and how far it may err. */
@Component({
  selector: 'app-micrometer-fields',
  imports: [MatFormFieldModule, MatInputModule, MatRadioModule, MatSelectModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './micrometer-fields.html',
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 10px;
    }
    mat-radio-group {
      display: flex;
      flex-direction: column;
    }
  `,
})
export class MicrometerFields {
  readonly micrometer = model.required<Micrometer>();

  protected readonly spacings = SPACINGS;
  protected readonly uncertificated = UNCERTIFICATED_TOLERANCE_UM;
  /** null while another length is typed */
  protected readonly spacingChoice = signal<number | null>(10);
  protected readonly certificated = signal(false);

  protected chooseSpacing(um: number | null): void {
    this.spacingChoice.set(um);
    if (um !== null) this.setSpacing(um);
  }

  protected setSpacing(spacingUm: number): void {
    this.micrometer.update((micrometer) => ({ ...micrometer, spacingUm }));
  }

  protected setCertificated(certificated: boolean): void {
    this.certificated.set(certificated);
    if (!certificated) this.setTolerance(UNCERTIFICATED_TOLERANCE_UM);
  }

  protected setTolerance(toleranceUm: number): void {
    this.micrometer.update((micrometer) => ({ ...micrometer, toleranceUm }));
  }
}
