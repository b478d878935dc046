/** Invented people of the demo. Their passwords are published in the README and good for the demo only. */
export const DEMO_PEOPLE = [
  { name: 'Ines Carrow', email: 'ines@gannet.example', password: 'harbour-light', administrator: true, role: null },
  { name: 'Marta Quill', email: 'marta@gannet.example', password: 'tide-table', administrator: false, role: 'lead' },
  {
    name: 'Joss Harrow',
    email: 'joss@gannet.example',
    password: 'bell-buoy',
    administrator: false,
    role: 'technical-director',
  },
  {
    name: 'Tam Okafor',
    email: 'tam@gannet.example',
    password: 'rope-locker',
    administrator: false,
    role: 'technical-director',
  },
  {
    name: 'Wren Castellan',
    email: 'wren@gannet.example',
    password: 'paper-gull',
    administrator: false,
    role: 'artist',
  },
  { name: 'Pia Lund', email: 'pia@gannet.example', password: 'salt-wind', administrator: false, role: 'artist' },
];

const ROLE_WORDS = { lead: 'lead', 'technical-director': 'TD', artist: 'artist' };

export function demoLines() {
  const rows = DEMO_PEOPLE.map(
    (person) =>
      `  ${(person.administrator ? 'administrator' : ROLE_WORDS[person.role]).padEnd(14)} ${person.email.padEnd(22)} ${person.password}`,
  );
  return ['Demo sign-ins (Gannet & Thrift Pictures, The Tide Fair):', ...rows].join('\n');
}
