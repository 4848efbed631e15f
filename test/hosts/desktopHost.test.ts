import { describe } from 'vitest';
import { describeHost } from './contract.ts';
import { openDesktopHost } from './desktopTestHost.ts';

describe('the contract, in the desktop host', () => describeHost(openDesktopHost));
