import { serve } from '../machine/worker.js';
import { TASKS } from './tasks.js';

serve(TASKS);
