namespace LabWatch.Intake.Outgoing;

/// <summary>What the service tells by MQTT: one retained message a topic, at every broker, again after each connection.</summary>
public interface IStateBoard
{
    /// <summary>Sets the message of a topic; one that is already so is not sent again. Returns at once.</summary>
    /// <param name="path">Topic below the root of what is published, without a leading slash.</param>
    /// <param name="payload">The message, UTF-8; not empty.</param>
    void Tell(string path, byte[] payload);
}
