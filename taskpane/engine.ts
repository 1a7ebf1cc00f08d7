/** What the pane takes from the engine. Everything comes through its one door. */
export * from '../src/index';
