/** Runs before the page comes alive. zod must not try to compile: the content security policy forbids it, and says so. */
import { config } from 'zod/v4/core';

config({ jitless: true });
