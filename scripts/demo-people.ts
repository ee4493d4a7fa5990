// Prints the demonstration's sign-ins for npm start.
import { demoPeople } from './demo';

for (const { email, password, part } of Object.values(demoPeople))
  console.log(`  ${email} · ${password} · ${part}`);
