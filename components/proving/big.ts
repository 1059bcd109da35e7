/** Buttons of the proving page: a gloved thumb beside a panel, so larger than anywhere else. */
export const BIG = 'min-h-14 w-full text-[1.05rem] whitespace-normal sm:w-auto sm:px-6';
