/** As the program starts it, software WebGL permitted: the processor puts the page together. No calls to the outside. */
export const FLAGS = [
  '--no-sandbox',
  '--enable-unsafe-swiftshader',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--no-first-run',
];
