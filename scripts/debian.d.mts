export function installDebian(names: string[], purpose: string, otherWay: string): void;
