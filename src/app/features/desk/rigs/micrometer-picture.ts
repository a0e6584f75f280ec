import { ChangeDetectionStrategy, Component, computed, effect, inject, output, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButtonModule } from '@angular/material/button';
import { ApiProblem } from '../../../core/api-problem';
import { Picture } from '../../../ui/picture/picture';
import { ProblemBox } from '../../../ui/problem/problem';
import { Rule } from '../../../ui/rule/rule';
import { TrayStore } from '../tray/tray-store';
import { ACCEPT, droppedFiles } from '../uploads/picture-files';
import { UploadQueue } from '../uploads/upload-queue';

/** The first step of calibrating: a picture of the ruling, dropped, chosen, or taken from the tray. */
@Component({
  selector: 'app-micrometer-picture',
  imports: [MatButtonModule, Picture, ProblemBox, Rule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './micrometer-picture.html',
  styleUrl: './micrometer-picture.scss',
  host: {
    '(window:dragover)': 'dragOver($event)',
    '(window:dragleave)': 'dragLeave($event)',
    '(window:drop)': 'drop($event)',
  },
})
export class MicrometerPicture {
  protected readonly queue = inject(UploadQueue);
  private readonly tray = inject(TrayStore);

  /** the id of a picture that is ready to be looked at */
  readonly chosen = output<string>();

  protected readonly accept = ACCEPT;
  protected readonly over = signal(false);
  private readonly key = signal<number | null>(null);
  protected readonly upload = computed(() => {
    const key = this.key();
    return key === null ? undefined : this.queue.upload(key);
  });
  private readonly arrived = computed(() => {
    const id = this.upload()?.imageId;
    return id ? this.tray.pictures()?.find((picture) => picture.id === id) : undefined;
  });
  protected readonly refusal = computed(() => {
    const refusal = this.arrived()?.refusal;
    return refusal ? new ApiProblem(refusal.code, 422, refusal.parameters) : null;
  });
  /** reference pictures first: one of them is likely meant */
  protected readonly waiting = computed(() =>
    this.tray.ready().toSorted((a, b) => Number(b.role === 'reference') - Number(a.role === 'reference')),
  );

  constructor() {
    this.tray.live.pipe(takeUntilDestroyed()).subscribe();
    effect(() => {
      const picture = this.arrived();
      if (picture?.state !== 'ready') return;
      if (picture.role !== 'reference') this.tray.edit([picture.id], { role: 'reference' });
      this.chosen.emit(picture.id);
    });
  }

  protected bringChosen(input: HTMLInputElement): void {
    this.bring([...(input.files ?? [])]);
    input.value = '';
  }

  protected dragOver(event: DragEvent): void {
    if (!event.dataTransfer?.types.includes('Files')) return;
    event.preventDefault();
    this.over.set(true);
  }

  protected dragLeave(event: DragEvent): void {
    if (event.relatedTarget === null) this.over.set(false); // out of the window
  }

  protected drop(event: DragEvent): void {
    this.over.set(false);
    if (!event.dataTransfer?.types.includes('Files')) return;
    event.preventDefault();
    void droppedFiles(event.dataTransfer).then((files) => this.bring(files));
  }

  /** Only the first: one picture holds one ruling. */
  private bring([file]: readonly File[]): void {
    if (file) this.key.set(this.queue.add([file])[0] ?? null);
  }
}
