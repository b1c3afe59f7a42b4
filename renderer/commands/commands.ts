import { chooseFile } from '../files/choose-file.js';
import { demos } from '../files/demos.js';
import { tracings, type Tracing, type ThemeChoice } from '../state/view.svelte.js';
import type { Workbench } from '../state/workbench.svelte.js';
import type { Command, Menu } from './command.js';

const always = () => true;

/** Every command of the window, by where the menu has it. */
export function makeCommands(bench: Workbench) {
  const { view, run, playback, account, drawing } = bench;
  const hasRun = () => run.recording !== null && run.status !== 'running';
  const canRun = () => drawing.mechanism !== null && !bench.isRunning;
  const onRunSheet = () => view.sheet === 2 && hasRun();

  const open: Command = {
    id: 'open',
    label: 'Open…',
    shortcut: 'Ctrl+O',
    isEnabled: always,
    run: () => void chooseFile().then((file) => file && bench.open(file)),
  };
  const demoList = demos.map((demo): Command => ({
    id: `demo:${demo.name}`,
    label: demo.title,
    isEnabled: always,
    run: () => void bench.open(demo),
  }));
  const runIt: Command = {
    id: 'run',
    get label() {
      return run.number > 0 ? 'Run again' : 'Run';
    },
    shortcut: 'F5',
    isEnabled: canRun,
    run: () => void bench.start(),
  };
  const halt: Command = {
    id: 'halt',
    label: 'Halt',
    shortcut: 'Esc',
    isEnabled: () => bench.isRunning,
    run: () => bench.halt(),
  };
  const feed: Command = {
    id: 'feed',
    get label() {
      return playback.feeding ? 'Stop' : 'Feed';
    },
    shortcut: 'Space',
    isEnabled: onRunSheet,
    run: () => playback.toggle(),
  };
  const back: Command = { id: 'back', label: 'Back a tick', shortcut: ',', isEnabled: onRunSheet, run: () => playback.tick(-1) }; // prettier-ignore
  const on: Command = {
    id: 'on',
    label: 'On a tick',
    shortcut: '.',
    isEnabled: onRunSheet,
    run: () => playback.tick(1),
  };
  const slower: Command = { id: 'slower', label: 'Slower paper', shortcut: '[', isEnabled: onRunSheet, run: () => playback.changeRate(-1) }; // prettier-ignore
  const faster: Command = { id: 'faster', label: 'Faster paper', shortcut: ']', isEnabled: onRunSheet, run: () => playback.changeRate(1) }; // prettier-ignore
  const stations = Array.from({ length: 9 }, (_, i): Command => ({
    id: `station:${i + 1}`,
    label: `Go to station ${i + 1}`,
    shortcut: String(i + 1),
    isEnabled: () => onRunSheet() && account.stationMarked(String(i + 1)) !== null,
    run: () => bench.goToStation(String(i + 1)),
  }));
  const sheet = (number: 1 | 2, label: string): Command => ({
    id: `sheet:${number}`,
    label,
    shortcut: `F${number + 1}`,
    isEnabled: always,
    isChecked: () => view.sheet === number,
    run: () => (view.sheet = number),
  });
  const key: Command = {
    id: 'key',
    label: 'Key',
    shortcut: 'K',
    isEnabled: () => view.geometry.compact,
    isChecked: () => view.keyOpen,
    run: () => (view.keyOpen = !view.keyOpen),
  };
  const tracingCommands = tracings.map((tracing) => tracingCommand(bench, tracing));
  const theme = (choice: ThemeChoice, label: string): Command => ({
    id: `theme:${choice}`,
    label,
    isEnabled: always,
    isChecked: () => view.themeChoice === choice,
    run: () => view.chooseTheme(choice),
  });
  const help: Command = { id: 'help', label: 'Help', shortcut: 'F1', isEnabled: always, run: () => (view.help = true) };

  const sheets = [sheet(1, 'Sheet 1 Drawing'), sheet(2, 'Sheet 2 Run')];
  const themes = [theme('light', 'Light'), theme('dark', 'Dark'), theme('system', 'As the system')];
  const menus: Menu[] = [
    { label: 'File', groups: [[open], demoList] },
    { label: 'Run', groups: [[runIt, halt], [feed, back, on], [slower, faster], stations] },
    { label: 'View', groups: [sheets, [key, ...tracingCommands], themes] },
    { label: 'Help', groups: [[help]] },
  ];
  return { open, demoList, run: runIt, halt, feed, back, on, slower, faster, stations, sheets, key, tracings: tracingCommands, themes, help, menus }; // prettier-ignore
}

export type Commands = ReturnType<typeof makeCommands>;

const tracingNames: Record<Tracing, [label: string, shortcut: string]> = {
  trail: ['Trail', 'T'],
  forces: ['Forces', 'F'],
  lossMap: ['Loss map', 'L'],
  balloons: ['Balloons', 'B'],
};

function tracingCommand({ view }: Workbench, tracing: Tracing): Command {
  const [label, shortcut] = tracingNames[tracing];
  return {
    id: `tracing:${tracing}`,
    label,
    shortcut,
    // Balloons hide on a small sheet, whatever is chosen.
    isEnabled: () => tracing !== 'balloons' || !view.geometry.compact,
    isChecked: () => view.shown[tracing],
    run: () => view.toggle(tracing),
  };
}

/** All commands that have a key, once each. */
export function commandList({ menus }: Commands): Command[] {
  return menus.flatMap(({ groups }) => groups.flat());
}
