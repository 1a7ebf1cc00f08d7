/** Version text for the calculation record; a test holds it equal to package.json. */
export const VERSION = 'Spanrow 0.1.0';
