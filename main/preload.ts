import { contextBridge, ipcRenderer } from 'electron';
import { channels, type FileContent, type WindowBridge } from './ipc/contract.js';

const bridge: WindowBridge = {
  openFile: () => ipcRenderer.invoke(channels.openFile) as Promise<FileContent | null>,
  givenFile: () => ipcRenderer.invoke(channels.givenFile) as Promise<FileContent | null>,
};

contextBridge.exposeInMainWorld('joulewright', bridge);
