import { ChangeDetectionStrategy, Component, computed, inject, model } from '@angular/core';
import { FormsModule } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { RouterLink } from '@angular/router';
import { rigRoutes } from '@shared/contracts/rigs';
import { Api } from '../../core/api';
import { ProblemBox } from '../../ui/problem/problem';
import { scaleLine } from './scale-words';

/** A setting of the own rigs, each with the scale that it would give. */
@Component({
  selector: 'app-setting-choice',
  imports: [FormsModule, MatFormFieldModule, MatSelectModule, RouterLink, ProblemBox],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (rigs.error(); as error) {
      <app-problem [problem]="error" [retry]="true" (again)="rigs.reload()" />
    } @else if (groups().length > 0) {
      <mat-form-field appearance="outline">
        <mat-label i18n>Setting</mat-label>
        <mat-select [ngModel]="settingId()" (ngModelChange)="settingId.set($event)" name="setting">
          @for (group of groups(); track group.id) {
            <mat-optgroup [label]="group.name">
              @for (setting of group.settings; track setting.id) {
                <mat-option [value]="setting.id" [disabled]="setting.scale === null">
                  {{ setting.name }}
                  @if (setting.scale; as scale) {
                    <span class="soft numbers">, {{ scale }}</span>
                  } @else {
                    <span class="soft" i18n>, not calibrated</span>
                  }
                </mat-option>
              }
            </mat-optgroup>
          }
        </mat-select>
      </mat-form-field>
    } @else if (rigs.isLoading()) {
      <p class="soft" role="status" i18n>Looking for your rigs…</p>
    } @else {
      <p i18n>
        You have no rig yet. <a routerLink="/desk/rigs">Describe one and calibrate it</a>; its pictures then have their
        scale by themselves.
      </p>
    }
  `,
  styles: `
    mat-form-field {
      width: 100%;
    }
    p {
      font-size: 0.9375rem;
    }
  `,
})
export class SettingChoice {
  readonly settingId = model.required<string | null>();

  protected readonly rigs = inject(Api).resource(rigRoutes.list, () => ({}));
  protected readonly groups = computed(() =>
    (this.rigs.hasValue() ? this.rigs.value() : [])
      .filter(({ settings }) => settings.length > 0)
      .map(({ id, name, settings }) => ({
        id,
        name,
        settings: settings.map((setting) => {
          const { calibration } = setting;
          const line = calibration ? scaleLine({ ...calibration, grounds: 'calibrated' }) : null;
          return { id: setting.id, name: setting.name, scale: line && `${line.value}/px ${line.doubt}` };
        }),
      })),
  );
}
