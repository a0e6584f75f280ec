import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatDialog, MatDialogModule } from '@angular/material/dialog';
import { rigRoutes, type RigView, type SettingView } from '@shared/contracts/rigs';
import { Api } from '../../../core/api';
import { Empty } from '../../../ui/empty/empty';
import { ProblemBox } from '../../../ui/problem/problem';
import { RigForm } from './rig-form';
import { SettingCard } from './setting-card';
import { SettingForm } from './setting-form';

/** A person's rigs, their settings and what one pixel means at each. */
@Component({
  selector: 'app-rigs',
  imports: [MatButtonModule, MatDialogModule, Empty, ProblemBox, SettingCard],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './rigs.html',
  styleUrl: './rigs.scss',
  host: { class: 'page' },
})
export class Rigs {
  private readonly dialog = inject(MatDialog);

  /** a micrometer picture that waits for its setting: `?image=` */
  readonly image = input<string>();

  protected readonly rigs = inject(Api).resource(rigRoutes.list, () => ({}));

  protected addRig(): void {
    this.dialog
      .open<RigForm, undefined, RigView>(RigForm, { width: '460px', maxWidth: '96vw' })
      .afterClosed()
      .subscribe((rig) => {
        if (!rig) return;
        this.rigs.reload();
        this.addSetting(rig);
      });
  }

  protected addSetting(rig: RigView): void {
    this.dialog
      .open<SettingForm, RigView, SettingView>(SettingForm, { width: '460px', maxWidth: '96vw', data: rig })
      .afterClosed()
      .subscribe((setting) => {
        if (setting) this.rigs.reload();
      });
  }
}
