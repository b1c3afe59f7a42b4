import './styles/fonts.css';
import './styles/base.css';
import { mount } from 'svelte';
import App from './App.svelte';
import { Workbench } from './state/workbench.svelte.js';
import { startSolver } from './state/solver.js';

const target = document.getElementById('window');
if (!target) throw new Error('The page has no element with the id "window".');

mount(App, { target, props: { bench: new Workbench(startSolver) } });
