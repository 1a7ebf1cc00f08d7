/** The pane's code is fetched when the page is seen, and only once. */
import { whenShown, type Glass } from '../../taskpane/load';

class FakeGlass extends EventTarget {
  visibilityState: DocumentVisibilityState = 'hidden';
  innerWidth = 0;
  innerHeight = 0;
  readonly waiting: (() => void)[] = [];
  readonly document = this as unknown as Glass['document'];
  setTimeout(work: () => void): void {
    this.waiting.push(work);
  }
  settle(): void {
    for (const work of this.waiting.splice(0)) work();
  }
  show(): void {
    this.visibilityState = 'visible';
    this.innerWidth = 350;
    this.innerHeight = 700;
  }
}

function watch(glass: FakeGlass, announce?: (shown: () => void) => void) {
  const load = jest.fn();
  whenShown(glass, load, announce);
  return load;
}

it('a page opened for the functions alone loads nothing', () => {
  const glass = new FakeGlass();
  const load = watch(glass);
  glass.settle();
  expect(load).not.toHaveBeenCalled();
});

it('a page that calls itself visible but has no size loads nothing', () => {
  const glass = new FakeGlass();
  glass.visibilityState = 'visible';
  const load = watch(glass);
  glass.settle();
  expect(load).not.toHaveBeenCalled();
});

it('a page that is seen loads the pane after its own scripts, not before', () => {
  const glass = new FakeGlass();
  glass.show();
  const load = watch(glass);
  expect(load).not.toHaveBeenCalled();
  glass.settle();
  expect(load).toHaveBeenCalledTimes(1);
});

it.each(['visibilitychange', 'resize'])('a hidden page loads the pane at %s', (event) => {
  const glass = new FakeGlass();
  const load = watch(glass);
  glass.settle();
  glass.dispatchEvent(new Event(event));
  expect(load).not.toHaveBeenCalled();
  glass.show();
  glass.dispatchEvent(new Event(event));
  expect(load).toHaveBeenCalledTimes(1);
});

it.each(['focus', 'pointerdown', 'keydown'])(
  'a touch (%s) loads the pane whatever the page says of itself',
  (event) => {
    const glass = new FakeGlass();
    const load = watch(glass);
    glass.settle();
    glass.dispatchEvent(new Event(event));
    expect(load).toHaveBeenCalledTimes(1);
  },
);

it('the host’s own word loads it, and every later sign does nothing', () => {
  const glass = new FakeGlass();
  let say = (): void => undefined;
  const load = watch(glass, (shown) => (say = shown));
  say();
  glass.show();
  say();
  glass.settle();
  for (const event of ['visibilitychange', 'resize', 'focus', 'pointerdown', 'keydown'])
    glass.dispatchEvent(new Event(event));
  expect(load).toHaveBeenCalledTimes(1);
});
