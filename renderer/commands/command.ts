/** Something the window can do: one object serves the menu, the keys, the buttons and the tests. */
export interface Command {
  id: string;
  label: string;
  /** As the key caps have it: "Space", "F5", "Ctrl+O", ",". */
  shortcut?: string;
  isEnabled: () => boolean;
  /** For one that is on or off. */
  isChecked?: () => boolean;
  run: () => void;
}

/** A menu of the bar: groups of commands, ruled off from each other. */
export interface Menu {
  label: string;
  groups: readonly (readonly Command[])[];
}
