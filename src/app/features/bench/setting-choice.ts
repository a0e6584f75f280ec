import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import { rigRoutes } from '@shared/contracts/rigs';
import { Api } from '../../core/api';
import { ProblemBox } from '../../ui/problem/problem';
import { scaleLine } from './scale-words';

/** The settings of the own rigs, each with the scale that it would give: one touch chooses. */
@Component({
  selector: 'app-setting-choice',
  imports: [RouterLink, ProblemBox],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (rigs.error(); as error) {
      <app-problem [problem]="error" [retry]="true" (again)="rigs.reload()" />
    } @else if (groups().length > 0) {
      <p class="small" i18n>Choose the setting that it was taken with; its scale is kept at once.</p>
      @for (group of groups(); track group.id) {
        <div role="group" [attr.aria-label]="group.name">
          <h3>{{ group.name }}</h3>
          @for (setting of group.settings; track setting.id) {
            @if (setting.scale; as scale) {
              <button
                type="button"
                [attr.aria-current]="setting.id === current() || null"
                (click)="chosen.emit(setting.id)"
              >
                <span>{{ setting.name }}</span> <span class="soft numbers">{{ scale }}</span>
              </button>
            } @else {
              <p class="without">
                <span>{{ setting.name }}</span> <span class="soft" i18n>not calibrated</span>
              </p>
            }
          }
        </div>
      }
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
    h3 {
      margin: 0 0 4px;
      font-family: inherit;
      font-size: 0.9375rem;
      font-weight: 600;
    }
    [role='group'] {
      margin-bottom: 12px;
    }
    button,
    .without {
      display: flex;
      flex-wrap: wrap;
      justify-content: space-between;
      align-items: center;
      gap: 0 12px;
      box-sizing: border-box;
      width: 100%;
      min-height: 44px;
      margin: 0;
      padding: 6px 10px;
      color: inherit;
      font: inherit;
      font-size: 0.9375rem;
      text-align: left;
      overflow-wrap: anywhere;
    }
    button {
      margin-bottom: 4px;
      background: none;
      border: 1px solid var(--line-strong);
      border-radius: 2px;
      cursor: pointer;
    }
    button:hover,
    button[aria-current] {
      border-color: var(--rust);
    }
    p {
      font-size: 0.9375rem;
    }
  `,
})
export class SettingChoice {
  /** the setting that the picture has now */
  readonly current = input<string | null>(null);
  readonly chosen = output<string>();

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
