/** Version of the tool, from package.json. */
declare const __SIMMERLINE_VERSION__: string;
