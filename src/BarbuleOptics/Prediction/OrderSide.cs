namespace BarbuleOptics.Prediction;

/// <summary>On which side of a barbule an order leaves.</summary>
public enum OrderSide
{
    /// <summary>Back into the surround.</summary>
    Reflected,

    /// <summary>Through the last face.</summary>
    Transmitted,
}
