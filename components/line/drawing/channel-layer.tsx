import { memo } from "react";
import type { Channel } from "./channels";

/** All channels: first every wall, then every water, so that meetings open into one another. */
export const ChannelLayer = memo(function ChannelLayer({
  channels,
  chosen = [],
}: {
  channels: readonly Channel[];
  chosen?: readonly string[];
}) {
  const isChosen = ({ from, to }: Channel) => chosen.includes(`${from}>${to}`);
  return (
    <g fill="none">
      {channels.map((channel) => (
        <path
          key={channel.key}
          d={channel.path}
          stroke={isChosen(channel) ? "var(--water-600)" : "var(--rule-2)"}
          strokeWidth={isChosen(channel) ? 9 : 7}
        />
      ))}
      {channels.map((channel) => (
        <path key={channel.key} d={channel.path} stroke="var(--water-100)" strokeWidth="5" />
      ))}
    </g>
  );
});
