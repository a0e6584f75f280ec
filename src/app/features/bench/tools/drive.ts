import type { ImagePoint } from '@shared/geometry/points';
import type { Tool, ToolEdit, ToolInput } from './tool';

/** For specs: drives a tool as a hand would, and keeps what it made. The slop is 3 px; ids count up. */
export function drive<S>(tool: Tool<S>): Drive<S> {
  return new Drive(tool);
}

export class Drive<S> {
  state: S;
  readonly edits: ToolEdit[] = [];
  private ids = 0;

  constructor(private readonly tool: Tool<S>) {
    this.state = tool.start;
  }

  down(at: ImagePoint): this {
    return this.point('down', at);
  }
  move(at: ImagePoint): this {
    return this.point('move', at);
  }
  up(at: ImagePoint): this {
    return this.point('up', at);
  }
  click(at: ImagePoint): this {
    return this.down(at).up(at);
  }
  drag(from: ImagePoint, to: ImagePoint): this {
    return this.down(from).move(to).up(to);
  }
  tell(type: 'abort' | 'back' | 'cancel'): this {
    return this.send({ type });
  }
  finish(): this {
    return this.send({ type: 'finish', newId: this.newId() });
  }

  private point(type: 'down' | 'move' | 'up', at: ImagePoint): this {
    return this.send({ type, at, slop: 3, newId: this.newId() });
  }
  private newId(): string {
    return `note-${this.ids++}`;
  }
  private send(input: ToolInput): this {
    const { state, edit } = this.tool.step(this.state, input);
    this.state = state;
    if (edit) this.edits.push(edit);
    return this;
  }
}
