import { Command } from 'commander';

export function drawCommand(): Command {
  return new Command('draw').description('Draw a crystal as SVG.');
}
