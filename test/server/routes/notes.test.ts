import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { applyEdits, EMPTY_DOCUMENT } from '../../../shared/annotations/document.js';
import type { Note, NoteEdit } from '../../../shared/annotations/note.js';
import type { EditsView, NotesView, PushedEdits } from '../../../shared/contracts/notes.js';
import type { SeriesView } from '../../../shared/contracts/series.js';
import { newId } from '../../../server/ids.js';
import { type Browser, type Person, TestApp } from '../../support/app.js';
import { makeFind } from '../../support/builders/finds.js';
import { changing, making, pointerNote, removing, sporeNote } from '../../support/builders/notes.js';
import { addPicture } from '../../support/builders/pictures.js';

describe('notes on a picture', () => {
  let server: TestApp;
  let writer: Person;
  let browser: Browser;
  let imageId: string;
  let series: SeriesView;
  beforeEach(async () => {
    server = await TestApp.open();
    writer = await server.addPerson('photographer', 'Imre');
    browser = await server.signIn(writer);
    imageId = await addPicture(server, { ownerId: writer.id, width: 1600, height: 1200 });
    await makeFind(browser, [imageId]);
    series = await open(browser, imageId);
  });
  afterEach(() => server.close());

  async function open(by: Browser, image: string, structure = 'spore'): Promise<SeriesView> {
    const rules = { structure, edgeRule: 'outer', ornamentIncluded: null };
    return (await by.post(`/api/images/${image}/series`, rules).expect(200)).body as SeriesView;
  }
  const push = (by: Browser, ...edits: NoteEdit[]) => by.post(`/api/images/${imageId}/note-edits`, { edits });
  const pushed = async (by: Browser, ...edits: NoteEdit[]) =>
    (await push(by, ...edits).expect(200)).body as PushedEdits;
  const read = async (by: Browser = browser) =>
    (await by.get(`/api/images/${imageId}/notes`).expect(200)).body as NotesView;
  const spore = (wanted: Partial<Note> = {}) =>
    sporeNote({ imageId, layer: writer.id, seriesId: series.id, ...wanted });
  const pointer = (wanted: Partial<Note> = {}) => pointerNote({ imageId, layer: writer.id, ...wanted });
  const bodies = async () => ((await browser.get(`/api/series/${series.id}`)).body as SeriesView).bodies;

  it('are kept, numbered, and read by whoever sees the picture', async () => {
    const [body, words] = [spore(), pointer()];
    const { seq, outcomes } = await pushed(browser, making(body), making(words));
    expect(outcomes.map(({ outcome }) => outcome)).toEqual(['applied', 'applied']);
    const seen = await read(await server.visit());
    expect(seen).toMatchObject({ seq, layers: [{ name: 'Imre' }] });
    expect(seen.notes).toEqual([body, words]);
  });

  it('change nothing when an edit is sent twice', async () => {
    const edit = making(pointer());
    await pushed(browser, edit);
    const again = await pushed(browser, edit, removing(edit.after as Note), edit);
    expect(again.outcomes.map(({ outcome }) => outcome)).toEqual(['repeated', 'applied', 'repeated']);
    expect((await read()).notes).toEqual([]);
  });

  it('of two writers are merged in the order of the server; the later wins, and both stay in the history', async () => {
    const phone = await server.signIn(writer);
    const note = pointer({ text: 'wart' });
    const { seq } = await pushed(browser, making(note));
    const atDesk = changing(note, { ...note, text: 'spine' });
    const onPhone = changing(note, { ...note, text: 'warts in rows' });
    const added = making(pointer({ text: 'another' }));
    expect((await pushed(browser, atDesk)).outcomes[0]?.outcome).toBe('applied');
    expect((await pushed(phone, onPhone, added)).outcomes.map(({ outcome }) => outcome)).toEqual([
      'superseded',
      'applied',
    ]);
    const { notes } = await read();
    expect(notes.map(({ text }) => text)).toEqual(['warts in rows', 'another']);

    // whoever was away catches up with the edits and has the same document
    const { edits } = (await browser.get(`/api/images/${imageId}/note-edits?after=${seq}`)).body as EditsView;
    expect(edits.map(({ edit }) => edit.id)).toEqual([atDesk.id, onPhone.id, added.id]);
    const caughtUp = applyEdits(
      new Map([[note.id, note]]),
      edits.map(({ edit }) => edit),
    );
    expect([...caughtUp.values()]).toEqual(notes);
  });

  it('that were removed do not come back by a change made meanwhile', async () => {
    const note = spore();
    await pushed(browser, making(note));
    await pushed(browser, removing(note));
    const late = await pushed(browser, changing(note, { ...note, text: 'late' }));
    expect(late.outcomes[0]?.outcome).toBe('dropped');
    expect((await read()).notes).toEqual([]);
    expect(await bodies()).toEqual([]);
  });

  it('replay from the first edit to what is kept', async () => {
    const [a, b] = [spore(), pointer()];
    await pushed(
      browser,
      making(a),
      making(b),
      changing(b, { ...b, text: 'x' }),
      removing(a),
      changing(a, { ...a, text: 'y' }),
    );
    const { edits } = (await browser.get(`/api/images/${imageId}/note-edits?after=0`)).body as EditsView;
    const replayed = applyEdits(
      EMPTY_DOCUMENT,
      edits.map(({ edit }) => edit),
    );
    expect([...replayed.values()]).toEqual((await read()).notes);
  });

  describe('in their history', () => {
    const PLACE = 'under the third sleeper';
    const since = async (by: Browser, after: number) =>
      (await by.get(`/api/images/${imageId}/note-edits?after=${after}`).expect(200)).body as EditsView;

    it('keep what was taken back for who said it', async () => {
      const [removed, reworded] = [pointer({ text: PLACE }), pointer({ text: `${PLACE}, left` })];
      const { seq: said } = await pushed(browser, making(removed), making(reworded));
      const mended = { ...reworded, text: 'wart' };
      await pushed(browser, removing(removed), changing(reworded, mended));
      // an edit made without knowing of the removal is kept as dropped
      await pushed(browser, changing(removed, { ...removed, text: `${PLACE}, right` }));

      expect(JSON.stringify((await since(browser, 0)).edits)).toContain(PLACE);
      const others = [await server.visit(), await server.signIn(await server.addPerson('keeper'))];
      for (const other of others) {
        for (let after = 0; after <= said + 3; after++) {
          expect(JSON.stringify(await since(other, after))).not.toContain(PLACE);
        }
      }
    });

    it('bring others from any state to the same one, with the same number', async () => {
      const [a, b, c] = [spore(), pointer(), pointer()];
      const edits = [
        making(a),
        making(b),
        changing(b, { ...b, text: 'x' }),
        removing(a),
        changing(a, { ...a, text: 'too late' }),
        making(c),
        changing({ ...b, text: 'x' }, { ...b, text: 'y' }),
        making(a),
        removing(c),
      ];
      const visitor = await server.visit();
      const states = [new Map<string, Note>()];
      const numbers = [0];
      for (const edit of edits) {
        numbers.push((await pushed(browser, edit)).seq);
        states.push(new Map((await read()).notes.map((note) => [note.id, note])));
      }
      for (const [i, state] of states.entries()) {
        const answer = await since(visitor, numbers[i] as number);
        const caughtUp = applyEdits(
          state,
          answer.edits.map(({ edit }) => edit),
        );
        expect(caughtUp).toEqual(states.at(-1));
        expect(answer.seq).toBe(numbers.at(-1));
      }
    });
  });

  it("are written in one's own layer alone", async () => {
    const other = await server.addPerson('identifier', 'Maud');
    const note = pointer();
    await pushed(browser, making(note));
    const maud = await server.signIn(other);
    await push(maud, removing(note)).expect(403);
    await push(maud, changing(note, { ...note, layer: other.id })).expect(403);
    await push(maud, making(pointer())).expect(403);
    // as if it were new, without saying what was before
    await push(maud, making({ ...note, layer: other.id })).expect(403);
    expect((await read()).notes).toEqual([note]);
    await pushed(maud, making(pointer({ layer: other.id })));
    expect((await read()).layers.map(({ name }) => name)).toEqual(['Imre', 'Maud']);
  });

  it('are not taken from visitors, nor seen on a hidden find', async () => {
    await push(await server.visit(), making(pointer())).expect(401);
    const hidden = await addPicture(server, { ownerId: writer.id });
    await (await server.visit()).get(`/api/images/${hidden}/notes`).expect(404);
    await (await server.signIn(await server.addPerson('keeper'))).get(`/api/images/${hidden}/notes`).expect(404);
  });

  it('are kept all or none', async () => {
    const far = pointer({ geometry: { type: 'pointer', at: { x: 10, y: 10 }, label: { x: 3201, y: 10 } } });
    const answer = await push(browser, making(pointer()), making(far)).expect(422);
    expect(answer.body).toMatchObject({
      errors: [{ pointer: '#/edits/1/after/geometry', code: 'outside-the-picture' }],
    });
    expect(await read()).toMatchObject({ seq: 0, notes: [] });
  });

  it.each<[string, (note: Note) => Partial<Note>, string]>([
    ['a series that does not exist', () => ({ seriesId: newId() }), 'no-such-series'],
    ['no series for a measure', () => ({ seriesId: null }), 'series-and-kind'],
    ['a series for a pointer', () => ({ kind: 'point', geometry: pointer().geometry }), 'series-and-kind'],
    ['a pointer drawn as a measure', () => ({ geometry: pointer().geometry }), 'wrong-shape'],
    ['another picture', () => ({ imageId: newId() }), 'another-note'],
  ])('refuse %s', async (_, wrong, code) => {
    const note = spore();
    const answer = await push(browser, making({ ...note, ...wrong(note) })).expect(422);
    expect(answer.body).toMatchObject({ errors: [{ code }] });
  });

  it('refuse a shape that the structure is not measured by', async () => {
    const bent = spore({
      geometry: {
        type: 'path',
        points: [
          { x: 1, y: 1 },
          { x: 9, y: 9 },
        ],
      },
    });
    const answer = await push(browser, making(pointer()), making(bent)).expect(422);
    expect(answer.body).toMatchObject({ errors: [{ pointer: '#/edits/1', code: 'wrong-shape' }] });
    expect((await read()).notes).toEqual([]);
  });

  it("refuse another's series, and a series of another find or preparation", async () => {
    const maud = await server.signIn(await server.addPerson('identifier'));
    const elsewhere = await addPicture(server, { ownerId: writer.id });
    await makeFind(browser, [elsewhere]);
    for (const seriesId of [(await open(maud, imageId)).id, (await open(browser, elsewhere)).id]) {
      expect((await push(browser, making(spore({ seriesId }))).expect(422)).body).toMatchObject({
        errors: [{ code: 'no-such-series' }],
      });
    }
    const kept = spore();
    await pushed(browser, making(kept));
    await prepare();
    const other = await push(browser, making(spore())).expect(422);
    expect(other.body).toMatchObject({ errors: [{ code: 'another-preparation' }] });
    await pushed(browser, changing(kept, { ...kept, text: 'still mine' }), removing({ ...kept, text: 'still mine' }));
  });

  it('refuse an id that a note of another picture has, or an edit that was kept elsewhere', async () => {
    const edit = making(pointer());
    await pushed(browser, edit);
    const other = await addPicture(server, { ownerId: writer.id });
    const moved = { ...(edit.after as Note), imageId: other };
    const taken = await browser
      .post(`/api/images/${other}/note-edits`, { edits: [{ ...edit, after: moved }] })
      .expect(422);
    expect(taken.body).toMatchObject({ errors: [{ code: 'id-taken' }] });
    const again = await browser.post(`/api/images/${other}/note-edits`, { edits: [making(moved)] }).expect(422);
    expect(again.body).toMatchObject({ errors: [{ code: 'another-note' }] });
  });

  describe('that measure', () => {
    it('become bodies of the series, in pixels while there is no scale', async () => {
      await pushed(browser, making(spore()));
      expect(await bodies()).toMatchObject([
        { imageId, grounds: 'none', lengthPx: 50, widthPx: 40, lengthUm: null, lengthU: null },
      ]);
    });

    it('have one dimension until both are drawn', async () => {
      const cross = spore().geometry as Extract<Note['geometry'], { type: 'cross' }>;
      await pushed(browser, making(spore({ geometry: { ...cross, across: null } })));
      expect(await bodies()).toMatchObject([{ lengthPx: 50, widthPx: null }]);
    });

    it('measure nothing while both ends lie on one spot', async () => {
      const cross = spore().geometry as Extract<Note['geometry'], { type: 'cross' }>;
      const spot = { a: { x: 9, y: 9 }, b: { x: 9, y: 9 } };
      await pushed(
        browser,
        making(spore({ geometry: { ...cross, across: spot } })),
        making(spore({ geometry: { ...cross, along: spot, across: null } })),
      );
      expect(await bodies()).toMatchObject([{ lengthPx: 50, widthPx: null }]);
    });

    it('supersede what was drawn before, and keep it', async () => {
      const note = spore();
      const wider = {
        ...note,
        geometry: { ...note.geometry, across: { a: { x: 80, y: 120 }, b: { x: 140, y: 120 } } } as Note['geometry'],
      };
      await pushed(browser, making(note), changing(note, wider));
      await pushed(browser, changing(wider, { ...wider, text: 'tilted' })); // words alone measure nothing anew
      expect(await bodies()).toMatchObject([{ noteId: note.id, lengthPx: 50, widthPx: 60 }]);
      const kept = (await server.db
        .read('measurements')
        .where({ note_id: note.id })
        .orderBy('id')
        .pluck('superseded_at')) as unknown[];
      expect(kept.map((at) => at === null)).toEqual([false, true]);
      await pushed(browser, removing({ ...wider, text: 'tilted' }));
      expect(await bodies()).toEqual([]);
      expect(await server.db.read('measurements')).toHaveLength(2);
      expect(await server.db.read('measurement_values').whereNull('superseded_at')).toEqual([]);
    });

    it('get new values with a new scale, and the old ones stay with the scale that they came from', async () => {
      await pushed(browser, making(spore()), making(spore()));
      const optics = (magnification: number) => ({
        by: 'optics',
        pixelPitchUm: 4,
        magnification,
        relay: 1,
        binning: 1,
      });
      await browser.post(`/api/images/${imageId}/scales`, optics(20)).expect(200); // 0.2 µm/px
      const [first] = await bodies();
      expect(first).toMatchObject({ grounds: 'estimated' });
      expect([first?.lengthUm, first?.widthUm]).toEqual([expect.closeTo(10, 9), expect.closeTo(8, 9)]);
      await browser.post(`/api/images/${imageId}/scales`, optics(40)).expect(200);
      expect((await bodies()).map(({ lengthUm }) => lengthUm)).toEqual([expect.closeTo(5, 9), expect.closeTo(5, 9)]);
      await browser.post(`/api/images/${imageId}/scales`, { by: 'nothing' }).expect(200);
      expect(await bodies()).toMatchObject([{ grounds: 'none', lengthPx: 50, lengthUm: null }, { lengthUm: null }]);

      const history = (await server.db
        .read('measurement_values')
        .leftJoin('image_scales', 'image_scales.id', 'measurement_values.image_scale_id')
        .where({ dimension: 'length' })
        .orderBy('measurement_values.id')
        .select('um', 'um_per_px_x', 'superseded_at')) as {
        um: number | null;
        um_per_px_x: number | null;
        superseded_at: string | null;
      }[];
      expect(history).toHaveLength(8); // two bodies, four versions: no scale, 0.2, 0.1, none
      expect(history.filter((value) => value.superseded_at === null)).toHaveLength(2);
      expect(history.every((value) => (value.um === null) === (value.um_per_px_x === null))).toBe(true);
      expect(await server.db.read('measurements').whereNotNull('superseded_at')).toEqual([]);
    });
  });

  async function prepare(): Promise<void> {
    const [find] = (await browser.get('/api/finds')).body.filter(
      (row: { number: string }) => row.number === 'CW-1',
    ) as { id: string }[];
    const { observations } = (await browser.get(`/api/finds/${find?.id}`)).body as { observations: { id: string }[] };
    const preparation = {
      observationId: observations[0]?.id,
      title: 's',
      part: '',
      medium: '',
      stain: '',
      condition: 'fresh',
      imageIds: [imageId],
    };
    await browser.post(`/api/finds/${find?.id}/preparations`, preparation).expect(200);
  }
});
