import { describe } from 'vitest';
import { describeHost } from './contract.ts';
import { openLocalHost } from './localTestHost.ts';

describe('the contract, in the local host', () => describeHost(openLocalHost));
